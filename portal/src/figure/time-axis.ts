import { type Measure, clockStep, timeMeasure } from './measures.ts'
import { multiples, niceStep } from './steps.ts'

/** The unit for a span of time, and its ticks in seconds. */
export function timeAxis(end: number): { measure: Measure; ticks: number[] } {
  const measure = timeMeasure(end)
  const span = end / measure.size
  const step = clockStep(measure, span) ?? niceStep(span, 7)
  return { measure, ticks: multiples(step, 0, span).map((tick) => tick * measure.size) }
}
