/** Versions the numbers: an answer that changes in any digit is at least a new minor version. */
export const SOLVER_VERSION = '1.1.0'
