import type { Guide } from '../guide.ts'
import { pathOf } from './wall.ts'

const concrete = { conductivity: 2.3, volumetricHeatCapacity: 2400000 }

export const restart: Guide = {
  slug: 'a-change-in-mid-history',
  title: 'A change in mid-history',
  summary: 'Forms come off, a fan starts, a door opens: two calls, the second from where the first ended.',
  parts: [
    {
      heading: 'Solve up to the change',
      text: [
        'A wall of 0.8 m cools behind its forms for two days. Ask for a profile at the time of the change, closely enough that straight lines between the depths will do.',
      ],
      call: {
        path: pathOf('solve', 'slab-two-sides'),
        body: {
          ...concrete,
          thickness: 0.8,
          initialTemperature: 50,
          left: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 3 },
          right: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 3 },
          depths: [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8],
          times: [172800],
        },
      },
    },
    {
      heading: 'Go on from its profile',
      text: [
        'The temperatures of that answer are the `initialProfile` of the next call, which counts its times from the change. Below they stand rounded; send them as they came.',
        'The first hour after a change is the steepest: ask for the surface there, and for the difference to the middle.',
      ],
      call: {
        path: pathOf('solve', 'slab-initial-profile'),
        body: {
          ...concrete,
          thickness: 0.8,
          initialProfile: {
            depths: [0, 0.2, 0.4, 0.6, 0.8],
            temperatures: [31, 44, 49, 44, 31],
          },
          left: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 22 },
          right: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 22 },
          depths: [0, 0.4],
          times: [3600, 86400],
        },
      },
    },
  ],
  links: [
    { to: '/cases/slab-two-sides', text: 'slab-two-sides' },
    { to: '/cases/slab-initial-profile', text: 'slab-initial-profile' },
  ],
}
