import type { ReactNode } from 'react'
import type { Hatch } from '../hatches.tsx'
import type { Point } from '../points.ts'
import type { Face } from './face-sign.tsx'
import type { Frame, Measured } from './frame.ts'

/** How one kind of body is drawn, at any size. */
export interface BodyShape {
  /** The hatch where the material is not named. */
  hatch: Hatch
  /** Of the body as a part of the drawing: the share of the width and height that it takes. */
  draw(frame: Frame): ReactNode
  /** Where the signs of what acts stand: the first face, then a second one of its own. */
  faces(frame: Frame): readonly Face[]
  /** Where a position is marked: its parts of the body along x and y, from the face or the middle. */
  mark(frame: Frame, along: number, across: number): Point
  /** The field of a length and where it is dimensioned. */
  measured(frame: Frame): readonly Measured[]
  /** Wide bodies take the room to the right edge. */
  wide?: true
  /** In words. */
  text: string
}
