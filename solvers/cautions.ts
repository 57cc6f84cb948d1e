/**
 * Cautions travel in every answer of a case that can hurt someone; a client cannot switch them off.
 * A changed wording is a new version.
 */
export const cautions = {
  general: {
    version: 1,
    text: 'Answers follow the stated assumptions and inputs; responsibility for use remains with a qualified person under local rules.',
  },
  envelope: {
    version: 1,
    text: 'Not a compliance calculation. Condensation, air leakage and thermal bridges are outside this case.',
  },
  concrete: {
    version: 1,
    text: 'Where the body is concrete: indicative temperatures. Limits such as maximum temperature and core-surface difference (e.g. ACI 301: 70 °C, 19 K) are set by the project specification; cracking also depends on restraint and strength.',
  },
  burial: {
    version: 1,
    text: 'Estimate for uniform ground. Local frost-depth rules, utility standards and site investigation govern.',
  },
  food: {
    version: 1,
    text: 'Where the body is food: time estimate only. Legal cooling and storage limits apply; verify with a calibrated probe.',
  },
  contact: {
    version: 1,
    text: 'Interface temperature of idealised bodies; a heated or backed surface keeps rising, and this is not an upper limit for it. Burn risk depends on contact time, skin condition and area; assess with ISO 13732-1 and product rules. Not medical advice.',
  },
  control: { version: 1, text: 'Do not use as a safety interlock.' },
} as const

export type CautionId = keyof typeof cautions
