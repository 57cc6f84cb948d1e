import type { Guide } from '../guide.ts'
import { pathOf, places, wall } from './wall.ts'

export const quickStart: Guide = {
  slug: 'quick-start',
  title: 'Quick start',
  summary: 'From nothing to a first answer in your own program.',
  parts: [
    {
      heading: 'Find the case',
      text: [
        'A case is one body with one boundary: a slab in a fluid, a cylinder whose surface is held, a wall between two rooms. The catalogue narrows by what you can see in your problem.',
        'Each page solves as you change its numbers, without a key and free, and shows the call in four languages with the numbers that stand in the form.',
      ],
    },
    {
      heading: 'Make a key',
      text: [
        'Sign up and make a key under Keys. It is shown once. Put it where your program reads it, here `SOAK_KEY`, and never into a web page.',
      ],
    },
    {
      heading: 'Send the call',
      text: [
        'A wall of 0.2 m at 20 °C, both faces suddenly in air of −5 °C: its face and its middle after 1 and 10 hours.',
      ],
      call: { path: pathOf('solve'), body: { ...wall, ...places } },
    },
    {
      heading: 'Read the answer',
      text: [
        '`result.temperature` has one row for each time and one number for each depth, in °C. `accuracy.bound` is an upper limit of the error of the arithmetic. `checks`, `warnings` and `cautions` say what to hold it against: show them to whoever uses the number.',
        'The same input to the same `solver` version gives the same bytes. What belongs to the call stands in headers: `Request-Id`, `Points-Charged`, `Points-Remaining`.',
        'With `"detail": "compact"` an answer holds the result, its bounds and the codes of warnings alone.',
      ],
    },
  ],
  links: [
    { to: '/cases', text: 'Find a case' },
    { to: '/sign-up', text: 'Get a key' },
  ],
}
