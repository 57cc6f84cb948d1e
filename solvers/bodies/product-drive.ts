import { z } from 'zod'
import type { Issue } from '../errors.ts'
import { film, surfaceTemperature } from '../statement/fields.ts'
import { filmWarnings } from '../statement/film.ts'
import type { ProductDrive } from './product-films.ts'
import type { Warning } from '../warnings.ts'

/* What drives a body whose answer is a product: one temperature at all its faces, or one fluid behind films. */

const ways = 'surfaceTemperature, or ambientTemperature with filmCoefficient, or with filmCoefficients'

/** The fields of the drive, all optional: exactly one of the three ways is to be taken. */
export function driveFields<D extends string>(directions: Record<D, string>) {
  const shape = Object.fromEntries(Object.keys(directions).map((name) => [name, film.filmCoefficient])) as Record<
    D,
    typeof film.filmCoefficient
  >
  const names = Object.keys(directions).join(', ')
  const told = Object.entries(directions)
    .map(([name, faces]) => `${name} of ${String(faces)}`)
    .join(', ')
  return {
    surfaceTemperature: surfaceTemperature.optional(),
    ambientTemperature: film.ambientTemperature.optional(),
    filmCoefficient: film.filmCoefficient.optional(),
    filmCoefficients: z
      .strictObject(shape)
      .meta({
        title: 'Film coefficients',
        description: `Film coefficients where they differ: ${told}. One fluid for all.`,
        'x-accepted': `an object with ${names}, each 0, or a number from 1e-9 to 1e9 W/(m2.K)`,
        'x-hint': 'where they differ, in place of filmCoefficient',
      })
      .optional(),
  }
}

/** What a body of such fields holds. */
export type DriveInput = {
  surfaceTemperature?: number | undefined
  ambientTemperature?: number | undefined
  filmCoefficient?: number | undefined
  filmCoefficients?: Record<string, number> | undefined
}

/** The one way that was taken; refuses none, a part and two. */
export function resolveDrive(input: DriveInput, refuse: (issue: Issue) => void): ProductDrive {
  const { surfaceTemperature, ambientTemperature, filmCoefficient, filmCoefficients } = input
  const filmed = Object.entries({ filmCoefficients, filmCoefficient, ambientTemperature }).find(
    ([, given]) => given !== undefined,
  )
  if (surfaceTemperature !== undefined) {
    if (!filmed) return { surfaceTemperature }
    const detail = `The surface is driven twice: by surfaceTemperature and by ${filmed[0]}.`
    refuse({ pointer: `#/${filmed[0]}`, code: 'conflicting-fields', detail, accepted: `exactly one of ${ways}` })
    return {}
  }
  if (filmCoefficient !== undefined && filmCoefficients !== undefined) {
    const detail = 'The film is given twice: by filmCoefficient and by filmCoefficients.'
    refuse({ pointer: '#/filmCoefficients', code: 'conflicting-fields', detail, accepted: `exactly one of ${ways}` })
  }
  if (filmCoefficient === undefined && filmCoefficients === undefined) {
    const detail = 'What drives the surface is missing.'
    refuse({ pointer: '#/filmCoefficient', code: 'missing-field', detail, accepted: `exactly one of ${ways}` })
  } else if (ambientTemperature === undefined) {
    const detail = 'The temperature of the fluid behind the film is missing.'
    refuse({ pointer: '#/ambientTemperature', code: 'missing-field', detail, accepted: 'ambientTemperature' })
  }
  return {
    ...(ambientTemperature === undefined ? {} : { ambientTemperature }),
    ...(filmCoefficient === undefined ? {} : { filmCoefficient }),
    ...(filmCoefficients === undefined ? {} : { filmCoefficients }),
  }
}

export function productWarnings(drive: ProductDrive): Warning[] {
  const films = Object.values(drive.filmCoefficients ?? { all: drive.filmCoefficient ?? 0 }).filter((h) => h > 0)
  return films.length === 0 ? [] : filmWarnings(Math.min(...films))
}
