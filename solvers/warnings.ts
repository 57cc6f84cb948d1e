/** Warnings say that a number may not mean what its reader thinks. Each code has its own page in the portal. */
export const warningCodes = {
  'body-too-thin': {
    title: 'A body is too thin for the times asked for',
    text: 'The far face has been felt: from there on a body without end is no longer a good model. In contact the echo is 1 % at a·t/L² = 0.30.',
  },
  'end-effects': {
    title: 'The ends of the cylinder are felt',
    text: 'The cylinder is taken to be endless. After length²/(90a) heat that passes beyond its ends changes the middle by about 1 %, and the answer overstates the change.',
  },
  'film-includes-radiation-unknown': {
    title: 'The film coefficient is taken as the total',
    text: 'The film coefficient is taken as the total, radiation included. One for air movement alone needs about 5 W/(m2.K) more indoors.',
  },
  'film-constant': {
    title: 'The film is the same throughout',
    text: 'A film that stays hides a change of it, such as the removal of forms. Solve up to the change, then start again from the profile there.',
  },
  'lumped-biot-high': {
    title: 'One temperature for the whole body is a coarse model here',
    text: 'Above a Biot number of 0.1 the inside lags the face so much that one temperature does not describe the body.',
  },
  'lumped-errs-early': {
    title: 'The lumped body reaches its target early',
    text: 'A body with one temperature changes faster than the real one: the time to a temperature errs early, and the core of the real body comes to it later.',
  },
  'material-confidence-low': {
    title: 'The figures of the material are known roughly only',
    text: 'The properties are of the right order, no more. Take those of your material, or reckon with the standard uncertainty that the text names.',
  },
  'moisture-state-unspecified': {
    title: 'The moisture of the material is not stated',
    text: 'The properties are for the moisture usual in use, or for none that was stated. Wet material conducts and stores more, dry material less.',
  },
  'outside-typical-range': {
    title: 'A value is unusual',
    text: 'The value is allowed and solved exactly, but outside what is met in practice. A wrong unit is the common cause.',
  },
  'phase-change-crossed': {
    title: 'The material would freeze or thaw',
    text: 'A temperature lies beyond 0 degrees Celsius while the properties are those of the other side. The latent heat is left out, and the change comes too early.',
  },
} as const

export type WarningCode = keyof typeof warningCodes

export interface Warning {
  code: WarningCode
  text: string
  value: number
}
