/** Full counts in a proof run, reduced ones otherwise; the seed is printed by the test command. */
export const proof = process.env['SOAKSTONE_PROOF'] === '1'
export const seed = Number(process.env['SOAKSTONE_SEED'] || 1)
