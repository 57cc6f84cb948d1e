import type { Role, StaffRole } from '../permissions.ts'
import { newId } from '../ids.ts'

/* The demo's ids are the same in every installation, so that laying it out twice changes nothing. */
const fixed = (kind: Parameters<typeof newId>[0], number: number) =>
  newId(kind, { msecs: Date.UTC(2026, 0, 1), random: new Uint8Array(16).fill(number) })

export const account = { id: fixed('acct', 1), name: 'Ninefold Envelope Workshop', meteredLimit: 2_000_000 }

export const members: readonly { id: string; role: Role; name: string; mail: string }[] = [
  { id: fixed('prsn', 1), role: 'owner', name: 'Oda Fennimar', mail: 'owner@ninefold.example' },
  { id: fixed('prsn', 2), role: 'integrator', name: 'Ilo Brandwick', mail: 'integrator@ninefold.example' },
  { id: fixed('prsn', 3), role: 'reader', name: 'Rue Castellane', mail: 'reader@ninefold.example' },
]

export const agents: readonly { id: string; role: StaffRole; name: string; mail: string }[] = [
  { id: fixed('stff', 1), role: 'support', name: 'Sam Oberlin', mail: 'support@soakstone.example' },
]

/** Keys by name, who made them, and how they are used: calls of a weekday, and times asked per call. */
export const keys = [
  { id: fixed('key', 1), name: 'Envelope tool', by: 0, quota: null, calls: 14, times: [1, 24] },
  { id: fixed('key', 2), name: 'Nightly study', by: 1, quota: 40_000, calls: 9, times: [100, 480] },
  { id: fixed('key', 3), name: 'Workbench', by: 1, quota: 5_000, calls: 4, times: [1, 12] },
] as const

/** The key whose secret the demo gives out. */
export const givenKey = keys[0]
