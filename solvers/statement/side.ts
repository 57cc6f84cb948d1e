/** What happens at one of two sides of a body. */
export type Side =
  | { kind: 'temperature'; surfaceTemperature: number }
  | { kind: 'convection'; ambientTemperature: number; filmCoefficient: number; imposedHeatFlux?: number | undefined }
  | { kind: 'flux'; imposedHeatFlux: number }
  | { kind: 'insulated' }

/** Film coefficient of a side; infinite where the face is held, 0 where it passes no heat of itself. */
export function filmOf(side: Side): number {
  if (side.kind === 'temperature') return Infinity
  return side.kind === 'convection' ? side.filmCoefficient : 0
}

/** hL/k of a side. */
export function sideBiot(side: Side, length: number, conductivity: number): number {
  return (filmOf(side) * length) / conductivity
}

/** The temperature that a side drives the body to; undefined where it has none. */
export function temperatureOf(side: Side): number | undefined {
  if (side.kind === 'temperature') return side.surfaceTemperature
  return side.kind === 'convection' && side.filmCoefficient > 0 ? side.ambientTemperature : undefined
}

/** What a side absorbs whatever its temperature, W/m2. */
export function fluxOf(side: Side): number {
  return side.kind === 'flux' || side.kind === 'convection' ? (side.imposedHeatFlux ?? 0) : 0
}

/** Whether the flux at the side is known beforehand. */
export const passesNoHeat = (side: Side): boolean => filmOf(side) === 0
