import type { Guide } from './guide.ts'
import { asking } from './guides/asking.ts'
import { charges } from './guides/charges.ts'
import { quickStart } from './guides/quick-start.ts'
import { refusals } from './guides/refusals.ts'
import { restart } from './guides/restart.ts'
import { trust } from './guides/trust.ts'
import { units } from './guides/units.ts'

/** In the order in which they are best read. */
export const guides: readonly Guide[] = [quickStart, units, asking, trust, refusals, charges, restart]
