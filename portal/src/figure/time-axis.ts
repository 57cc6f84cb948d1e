import { type Measure, clockStep, timeMeasure } from './measures.ts'
import { multiples, niceStep } from './steps.ts'

/** The unit for a span of time, and its ticks in seconds. */
export function timeAxis(end: number, start = 0): { measure: Measure; ticks: number[] } {
  const measure = timeMeasure(Math.max(Math.abs(start), Math.abs(end)))
  const span = (end - start) / measure.size
  const step = clockStep(measure, span) ?? niceStep(span, 7)
  return {
    measure,
    ticks: multiples(step, start / measure.size, end / measure.size).map((tick) => tick * measure.size),
  }
}
