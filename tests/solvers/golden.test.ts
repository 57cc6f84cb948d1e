import { expect, it } from 'vitest'
import { compute, recorded } from './golden.ts'

it('numbers change only with the version of the solver (npx tsx tests/solvers/golden.ts records them)', () => {
  const before = recorded()
  const now = compute()
  if (before.solver === now.solver) expect(now.digests).toEqual(before.digests)
  else expect(before.solver, 'record the answers of the new version').toBe(now.solver)
})
