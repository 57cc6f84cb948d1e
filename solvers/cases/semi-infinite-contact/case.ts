import { deepCheck, type Thin, thinWarnings } from '../../bodies/deep-enough.ts'
import { heatBalance } from '../../bodies/heat-balance.ts'
import { z } from 'zod'
import { defineCase, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { checkedThickness, initialTemperature, solid } from '../../statement/fields.ts'
import type { OutputName } from '../../outputs.ts'
import { quantity } from '../../statement/quantity.ts'
import { refuseFluxAtStep } from '../../bodies/singular.ts'
import { resolveSolid, type Solid } from '../../statement/solid.ts'
import { solve, type ContactInput } from './solve.ts'

interface ContactResolved extends ContactInput, Resolved {
  thickness?: number
  other: Solid & { initialTemperature: number; thickness?: number }
  depths: number[]
  times: number[]
  outputs: OutputName[]
}

const body = {
  ...solid,
  initialTemperature,
  thickness: checkedThickness,
}

const fields = {
  ...body,
  other: z.strictObject(body).meta({
    title: 'Other body',
    description: 'Other body: the solid that is touched, with its initial temperature; it lies at depths below 0.',
    'x-accepted': 'a solid with its initialTemperature',
    'x-hint': 'what is touched; lies at depths below 0',
  }),
  contactConductance: quantity({
    symbol: 'hₖ',
    unit: 'W/(m2.K)',
    label: 'Contact conductance',
    min: 1e-9,
    max: 1e12,
    typical: [100, 1e5],
    hint: 'left out: perfect contact; skin 500 to 2000, pressed metal 1e3 to 1e4',
  }).optional(),
}

export default defineCase<typeof fields, ContactResolved>({
  id: 'semi-infinite-contact',
  title: 'Two half spaces in contact',
  summary: 'Two bodies at their own temperatures touch, both too deep for their backs to be felt.',
  notes:
    'For moulds, floors under bare feet, hot surfaces that are touched and poured layers. In perfect contact both faces are at once at contactTemperature and stay there, until a thin body feels its back: give thickness, and the answer checks it (1 % of echo at a·t/L² = 0.30). A contactConductance holds the faces apart and lowers what the colder one feels, so the values without it always come with the answer: contactTemperature, and idealTemperature beside temperature. Depths from 0 on lie in the own body, below 0 in the other; heat fluxes are positive from the other body to the own.',
  formula: [
    'T = T_i + (T_k - T_i)\\,\\operatorname{erfc}(\\eta), \\qquad T_k = \\frac{b_1 T_1 + b_2 T_2}{b_1 + b_2}, \\qquad \\eta = \\frac{|x|}{2\\,(at)^{1/2}}, \\qquad b = (k\\rho c)^{1/2}',
    '\\text{with a conductance:}\\quad T = T_i + (T_k - T_i)\\,e^{-\\eta^2} \\left[\\operatorname{erfcx}(\\eta) - \\operatorname{erfcx}(\\eta + \\gamma)\\right], \\qquad \\gamma = h_k\\,t^{1/2} \\left(\\frac{1}{b_1} + \\frac{1}{b_2}\\right)',
    'q = h_k\\,(T_2 - T_1)\\,e^{-\\eta^2} \\operatorname{erfcx}(\\eta + \\gamma)',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 2.15'],
  family: 'half-space',
  sketch: { body: 'two-bodies', boundary: 'contact' },
  fields,
  places: 'depths',
  signedDepths: true,
  outputs: {
    temperature: {},
    idealTemperature: {},
    heatFlux: { text: 'Local heat flux, positive towards greater depths: from the other body to the own.' },
    surfaceHeatFlux: {},
    heatGained: {},
    remainingFraction: {},
    completedFraction: {},
    contactTemperature: {},
    surfaceTemperature: {},
    otherSurfaceTemperature: {},
  },
  absentOutputs: {
    meanTemperature: 'The bodies have no end, so their means stay the initial temperatures.',
    heatFraction: 'The heat that a body takes up in all is infinite.',
    steadyTemperature: 'Both bodies end at contactTemperature, after infinite time.',
    timeConstant: 'A body without end has no time constant.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['contact', 'general'],
  example: {
    conductivity: 0.37,
    volumetricHeatCapacity: 3.4e6,
    initialTemperature: 33,
    other: { conductivity: 1.3, density: 2200, specificHeat: 850, initialTemperature: 60 },
    contactConductance: 1500,
    depths: [-0.002, 0, 0.0002],
    times: [0.5, 5],
  },
  variants: [
    {
      title: 'A casting on its mould in perfect contact, all outputs',
      input: {
        conductivity: 0.9,
        diffusivity: 5e-7,
        initialTemperature: 25,
        other: { conductivity: 30, density: 7200, specificHeat: 700, initialTemperature: 900 },
        depths: [-0.01, 0, 0.005],
        times: [10, 300],
        outputs: [
          'temperature',
          'idealTemperature',
          'heatFlux',
          'surfaceHeatFlux',
          'heatGained',
          'remainingFraction',
          'completedFraction',
          'contactTemperature',
          'surfaceTemperature',
          'otherSurfaceTemperature',
        ],
      },
    },
    {
      title: 'A bare foot on a thin board, checked for its back',
      input: {
        conductivity: 0.4,
        volumetricHeatCapacity: 3.5e6,
        initialTemperature: 32,
        other: { conductivity: 0.16, diffusivity: 1.4e-7, initialTemperature: 19, thickness: 0.014 },
        contactConductance: 800,
        times: [60],
        outputs: ['surfaceTemperature', 'otherSurfaceTemperature', 'surfaceHeatFlux'],
      },
    },
  ],
  resolve(input, refuse): ContactResolved {
    const { other, contactConductance, initialTemperature, times } = input
    const own = resolveSolid(input, refuse)
    const touched = resolveSolid(other, (issue) => refuse(inside('other', issue)))
    if (contactConductance === undefined) refuseFluxAtStep(input, (depth) => depth === 0, refuse)
    return {
      ...own!,
      initialTemperature,
      ...given('thickness', input.thickness),
      other: { ...touched!, initialTemperature: other.initialTemperature, ...given('thickness', other.thickness) },
      ...given('contactConductance', contactConductance),
      depths: input.depths ?? [],
      times,
      outputs: contactConductance === undefined ? input.outputs : withIdeal(input.outputs),
    }
  },
  solve,
  end: ({ effusivity: e1, initialTemperature: T1, other: { effusivity: e2, initialTemperature: T2 } }) =>
    T1 + (T2 - T1) * (e2 / (e1 + e2)),
  numbers(input) {
    const until = thinBodies(input).map(({ until }) => until)
    return until.length === 0 ? {} : { validUntil: Math.min(...until) }
  },
  checks: (input) => [
    ...thinBodies(input).map((thin) => deepCheck(input.times, thin)),
    ...heatBalance(solve, input, { surfaceHeatFlux: 1 }),
  ],
  warnings: (input) => thinBodies(input).flatMap((thin) => thinWarnings(input.times, thin)),
  errs: errsOf,
})

const given = <K extends string>(name: K, value: number | undefined) =>
  (value === undefined ? {} : { [name]: value }) as Partial<Record<K, number>>

function inside(name: string, issue: Issue): Issue {
  return { ...issue, pointer: issue.pointer.replace('#/', `#/${name}/`) }
}

/** A resistance is never answered alone: what there would be without it comes first. */
function withIdeal(outputs: readonly OutputName[]): OutputName[] {
  const ideal: OutputName[] = outputs.includes('temperature')
    ? ['contactTemperature', 'idealTemperature']
    : ['contactTemperature']
  return [...new Set([...ideal, ...outputs])]
}

function thinBodies({ thickness, diffusivity, other }: ContactResolved): Thin[] {
  // 1 % of the echo of the far face has come back to the contact.
  const thin = (whose: 'own' | 'other', length: number | undefined, a: number): Thin[] =>
    length === undefined
      ? []
      : [
          {
            id: `${whose}-body-deep-enough`,
            name: `The ${whose} body`,
            until: (0.3 * length * length) / a,
            thickness: length,
          },
        ]
  return [...thin('own', thickness, diffusivity), ...thin('other', other.thickness, other.diffusivity)]
}

/** A thin own body warms through and is ahead of the answer; a thin other one is spent and lags it. */
function errsOf({ thickness, other }: ContactResolved) {
  if (thickness !== undefined) return other.thickness === undefined ? 'late' : undefined
  return other.thickness === undefined ? undefined : 'early'
}
