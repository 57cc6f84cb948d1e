import type { Issue } from '../errors.ts'

/** Temperatures along a body before the change, linear between the depths; the same depth twice is a jump. */
export interface InitialProfile {
  depths: number[]
  temperatures: number[]
}

/** The start of a body: one temperature, or a profile. */
export type Start = { initialTemperature: number } | { initialProfile: InitialProfile }

export function resolveStart(
  input: { initialTemperature?: number | undefined; initialProfile?: InitialProfile | undefined },
  thickness: number,
  refuse: (issue: Issue) => void,
): Start | undefined {
  const { initialTemperature, initialProfile } = input
  const accepted = 'exactly one of initialTemperature and initialProfile'
  if (initialProfile && initialTemperature !== undefined) {
    const detail = 'The start is given twice: by initialTemperature and by initialProfile.'
    refuse({ pointer: '#/initialProfile', code: 'conflicting-fields', detail, accepted })
    return undefined
  }
  if (!initialProfile && initialTemperature === undefined) {
    const detail = 'The initial temperature of the body is missing.'
    refuse({ pointer: '#/initialTemperature', code: 'missing-field', detail, accepted })
    return undefined
  }
  if (!initialProfile) return { initialTemperature: initialTemperature! }
  return isSound(initialProfile, thickness, refuse) ? { initialProfile } : undefined
}

/** Depths nearer to each other than this share of the thickness are meant as a jump, which is stated by the same depth twice. */
const LEAST_STEP = 1e-9

/** A profile must lie along the whole body, from face to face, and never turn back. */
export function isSound(
  { depths, temperatures }: InitialProfile,
  thickness: number,
  tell: (issue: Issue) => void,
): boolean {
  let sound = true
  const refuse = (issue: Issue) => {
    sound = false
    tell(issue)
  }
  const at = (j: number) => `#/initialProfile/depths/${j}`
  if (depths.length !== temperatures.length || depths.length < 2) {
    const detail = `The profile has ${depths.length} depths and ${temperatures.length} temperatures.`
    const accepted = 'as many temperatures as depths, at least 2'
    refuse({ pointer: '#/initialProfile/temperatures', code: 'wrong-length', detail, accepted })
  }
  if (depths[0] !== 0) {
    const detail = `The profile begins at ${depths[0]} m.`
    refuse({ pointer: at(0), code: 'out-of-range', detail, accepted: '0 m, the left or exposed face' })
  }
  const last = depths.length - 1
  if (depths[last] !== thickness) {
    const detail = `The profile ends at ${depths[last]} m, the body at ${thickness} m.`
    refuse({ pointer: at(last), code: 'out-of-range', detail, accepted: `${thickness} m, the thickness` })
  }
  for (let j = 1; j <= last; j++) {
    if (depths[j]! < depths[j - 1]!) {
      const detail = `This depth is ${depths[j]} m, the one before it ${depths[j - 1]} m.`
      refuse({ pointer: at(j), code: 'out-of-range', detail, accepted: 'depths that do not fall' })
    } else if (j > 1 && depths[j] === depths[j - 1] && depths[j] === depths[j - 2]) {
      const detail = `The depth ${depths[j]} m stands three times.`
      refuse({ pointer: at(j), code: 'conflicting-fields', detail, accepted: 'a depth once, or twice for a jump' })
    } else if (depths[j] !== depths[j - 1] && depths[j]! - depths[j - 1]! < LEAST_STEP * thickness) {
      const detail = `This depth is nearer to the one before it than a billionth of the thickness.`
      refuse({ pointer: at(j), code: 'out-of-range', detail, accepted: 'the same depth for a jump, or one farther on' })
    }
  }
  return sound
}

/** The profile of a start; a uniform one has the two faces. */
export function profileOf(from: Start, thickness: number): InitialProfile {
  if ('initialProfile' in from) return from.initialProfile
  return { depths: [0, thickness], temperatures: [from.initialTemperature, from.initialTemperature] }
}
