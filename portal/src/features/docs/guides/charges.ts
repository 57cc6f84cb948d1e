import type { Guide } from '../guide.ts'
import { pathOf, places, wall } from './wall.ts'

export const charges: Guide = {
  slug: 'points-and-quota',
  title: 'Points and quota',
  summary: 'What a call costs, and what happens when the quota is spent.',
  parts: [
    {
      heading: 'A point a number',
      text: [
        'A call costs its numbers times the weight of the case, and for some cases a set-up. The page of each case states both. A call is charged at least 10 points; many places and times in one call cost less than many calls.',
        '`points` in an answer is its price, the header `Points-Charged` what was taken, `Points-Remaining` what is left.',
      ],
      call: { path: pathOf('cost'), body: { operation: 'solve', input: { ...wall, ...places } } },
    },
    {
      heading: 'The quota',
      text: [
        'A trial holds 100 000 points for each UTC day. A key may have a quota of its own within that of the account. Points are taken in one step before the work, so the quota cannot be overdrawn, however many calls arrive at once.',
        'A call that needs more than is left is refused with `quota-exceeded` and costs nothing.',
      ],
    },
  ],
  links: [
    { to: '/problems/quota-exceeded', text: 'quota-exceeded' },
    { to: '/usage', text: 'Usage' },
  ],
}
