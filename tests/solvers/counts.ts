/** Full counts in a proof run, reduced ones otherwise; the seed is printed by the test command. */
export const proof = process.env['SOAKSTONE_PROOF'] === '1'
export const seed = Number(process.env['SOAKSTONE_SEED'] || 1)
/** A look before a commit, at a tenth of the random inputs. */
export const brief = process.env['SOAKSTONE_BRIEF'] === '1'
