import type { Check, Numbers } from '../case.ts'
import { lateNumbers, lumpedCourse } from './late-course.ts'
import type { LumpedBody } from './lumped-body.ts'
import type { Warning } from '../warnings.ts'

/* What the Biot number says of a body with one temperature; it is known where the body was stated by shape and solid. */

interface Lumped {
  body: LumpedBody
  capacity: number
  conductance: number
  biot?: number
  times: readonly number[]
}

export function lumpedNumbers({ body, capacity, conductance, biot, times }: Lumped): Numbers {
  const late = conductance === 0 ? {} : lateNumbers(lumpedCourse(capacity, conductance))
  if (!body.solid) return late
  const rate = body.solid.diffusivity / (body.length! * body.length!)
  return { biot: biot!, fourier: times.map((time) => rate * time), length: body.length!, ...late }
}

/** A body with one temperature has no inside that lags. */
export const lumpedErrs = ({ conductance }: Pick<Lumped, 'conductance'>) => (conductance === 0 ? undefined : 'early')

export function oneTemperatureWillDo(biot: number | undefined): Check[] {
  if (biot === undefined) return []
  const text = 'The Biot number is at most 0.1, so one temperature describes the body.'
  return [{ id: 'one-temperature-will-do', holds: biot <= 0.1, value: biot, limit: 0.1, text }]
}

export function biotWarnings(biot: number | undefined): Warning[] {
  if (biot === undefined || biot <= 0.1) return []
  return [
    {
      code: 'lumped-biot-high',
      text: 'The Biot number is above 0.1: inside and face differ noticeably. At 0.1 a slab is off by 2 % at its centre, a cylinder at 0.2 by 4.8 %, a sphere at 0.3 by 8.1 %.',
      value: biot,
    },
    {
      code: 'lumped-errs-early',
      text: 'The time to a temperature errs early: the core of the real body comes to it later.',
      value: biot,
    },
  ]
}
