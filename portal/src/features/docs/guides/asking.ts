import type { Guide } from '../guide.ts'
import { pathOf, places, wall } from './wall.ts'

export const asking: Guide = {
  slug: 'other-questions',
  title: 'When, how deep, how much at most',
  summary: 'The same body answers other questions than the temperature at a time.',
  parts: [
    {
      heading: 'When is a temperature reached',
      text: [
        '`time-to-reach` gives every time at which a place passes a target, with the rate of change there. Where it never does, the outcome is `never`, with the temperature that the place comes to.',
      ],
      call: { path: pathOf('time-to-reach'), body: { ...wall, depth: 0.1, target: 10 } },
    },
    {
      heading: 'How deep has it come',
      text: ['`depth-reached` looks along the depth at one time, and gives the gradient where the target stands.'],
      call: { path: pathOf('depth-reached'), body: { ...wall, time: 36000, target: 2 } },
    },
    {
      heading: 'The largest and the least',
      text: [
        '`extremes` gives both within a span, each with its time, and says where it stands at an end of the span.',
      ],
      call: { path: pathOf('extremes'), body: { ...wall, depth: 0.1, until: 36000 } },
    },
    {
      heading: 'What it would cost',
      text: [
        '`cost` examines a whole call without computing it, and is free. A call that would be refused is refused.',
      ],
      call: { path: pathOf('cost'), body: { operation: 'solve', input: { ...wall, ...places } } },
    },
  ],
  links: [{ to: '/cases/slab-convection', text: 'Try them on the page of a case' }],
}
