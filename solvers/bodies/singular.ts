import type { Issue } from '../errors.ts'
import type { OutputName } from '../outputs.ts'

interface Asked {
  times: readonly number[]
  depths?: readonly number[] | undefined
  outputs: readonly OutputName[]
}

/** A face stepped in temperature takes an infinite flux at time 0: fluxes there are refused, not answered as null. */
export function refuseFluxAtStep(
  { times, depths = [], outputs }: Asked,
  isFace: (depth: number) => boolean,
  refuse: (issue: Issue) => void,
): void {
  const local = outputs.includes('heatFlux') && depths.some(isFace)
  if (!local && !outputs.includes('surfaceHeatFlux')) return
  times.forEach((time, i) => {
    if (time !== 0) return
    const detail = 'The heat flux at a face that is stepped in temperature is infinite at time 0.'
    refuse({ pointer: `#/times/${i}`, code: 'singular-at-time-zero', detail, accepted: 'a time above 0 s' })
  })
}
