/** What drives a body whose answer is a product: one temperature at all its faces, or one fluid behind films. */
export interface ProductDrive {
  surfaceTemperature?: number
  ambientTemperature?: number
  filmCoefficient?: number
  /** By direction. */
  filmCoefficients?: Record<string, number>
}

/** Temperature that all faces are driven to. */
export function driveTemperature({ surfaceTemperature, ambientTemperature }: ProductDrive): number {
  return surfaceTemperature ?? ambientTemperature!
}

/** Film coefficient in a direction; Infinity where the faces themselves are held. */
export function filmIn(drive: ProductDrive, direction: string): number {
  if (drive.surfaceTemperature !== undefined) return Infinity
  return drive.filmCoefficient ?? drive.filmCoefficients![direction]!
}

/** Where the body ends: at the drive, or where no face passes heat as it was. */
export function productEnd(drive: ProductDrive & { initialTemperature: number }): number {
  const films = Object.values(drive.filmCoefficients ?? { all: drive.filmCoefficient ?? Infinity })
  return films.every((h) => h === 0) ? drive.initialTemperature : driveTemperature(drive)
}
