import type { Warning } from '../warnings.ts'

/** A film weaker than radiation alone in a room is rarely the total. */
export function filmWarnings(filmCoefficient: number): Warning[] {
  if (filmCoefficient === 0 || filmCoefficient >= 5) return []
  return [
    {
      code: 'film-includes-radiation-unknown',
      text: 'The film coefficient is taken as the total, radiation included. If yours is for air movement alone, add about 5 W/(m2.K) indoors.',
      value: filmCoefficient,
    },
  ]
}
