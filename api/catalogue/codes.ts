/* Codes that solvers speak in, for those who may know the API but no solver. */
export { cautions } from '../../solvers/cautions.ts'
export { warningCodes } from '../../solvers/warnings.ts'
export { dimensions } from '../../solvers/units/units.ts'
