import type { Field, Range } from './field.ts'
import { rangeOf } from './field.ts'

/** Where the parts of the figure stand, in pixels, for the width it has been given. */
export interface Layout {
  width: number
  height: number
  small: boolean
  /** The history stands beside the plan; below it where there is no room. */
  beside: boolean
  axis: number
  left: number
  right: number
  back: number
  top: number
  bottom: number
  planTop: number
  planHeight: number
  historyLeft: number
  size: number
  range: Range
  x(place: number): number
  y(temperature: number): number
  z(time: number): number
  /** Temperature along the history beside the plan. */
  across(temperature: number): number
}

export function layoutOf(field: Field, width: number, history: boolean): Layout {
  const small = width < 620
  const beside = history && width >= 820
  const size = small ? 200 : beside ? 236 : Math.round(Math.min(380, width * 0.44))
  const axis = small ? 38 : 54
  const outside = small ? 54 : 112
  const back = small ? 24 : 46
  const gap = beside ? 58 : small ? 20 : 40
  const left = axis + outside
  const right = width - back - gap - (beside ? size + 14 : 0)
  const top = 26
  const bottom = top + size
  const planTop = bottom + (small ? 58 : 62)
  const planHeight = small ? 200 : beside ? 250 : Math.round(Math.min(410, width * 0.47))
  const historyLeft = right + back + gap
  const range = rangeOf(field)
  const [first, last] = [field.places[0]!, field.places.at(-1)!]
  const end = field.times.at(-1)!
  const part = (temperature: number) => (temperature - range.low) / (range.high - range.low)
  return {
    width,
    height: planTop + planHeight + 30,
    small,
    beside,
    axis,
    left,
    right,
    back,
    top,
    bottom,
    planTop,
    planHeight,
    historyLeft,
    size,
    range,
    x: (place) => left + ((right - left) * (place - first)) / (last - first),
    y: (temperature) => bottom - size * part(temperature),
    z: (time) => planTop + (planHeight * time) / end,
    across: (temperature) => historyLeft + size * part(temperature),
  }
}
