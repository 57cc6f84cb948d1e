import { expect, test } from 'vitest'
import { inFormWords, withMinus } from '../../portal/src/api/form-words.ts'
import { partsOf } from '../../portal/src/components/symbol-parts.ts'
import { prefixOf, shortId } from '../../portal/src/features/staff/key-prefix.ts'
import { sentTime, timeMeasure } from '../../portal/src/figure/measures.ts'

const words = {
  labels: {
    accountName: 'Account name',
    mail: 'Mail address',
    times: 'Times',
    filmCoefficient: 'Film coefficient',
    left: 'Left side',
    initialProfile: 'Initial profile',
  },
  inside: { surfaceTemperature: 'Surface temperature', temperatures: 'Temperatures' },
  units: { Cel: '°C', 'W/(m2.K)': 'W/(m²·K)', m: 'm' },
}

test.each([
  ['accountName must have at least 1 character.', 'Account name must have at least 1 character.'],
  ['mail is missing. Accepted: a mail address.', 'Mail address is missing. Accepted: a mail address.'],
  ['times/1 is -3; at least 0 is accepted.', 'Times, value 2, is \u22123; at least 0 is accepted.'],
  ['Accepted: a number from 0 to 1e6 W/(m2.K).', 'Accepted: a number from 0 to 1e6 W/(m²·K).'],
  ['Accepted: a number from -273.15 to 1e4 Cel.', 'Accepted: a number from \u2212273.15 to 1e4 °C.'],
  ['left/surfaceTemperature is missing.', 'Left side, surface temperature, is missing.'],
  ['left is missing.', 'Left side is missing.'],
  ['initialProfile/temperatures/1 is -3.', 'Initial profile, temperatures, value 2, is \u22123.'],
  ['Accepted: a number from 0 to 1 J/kg.', 'Accepted: a number from 0 to 1 J/kg.'],
  ['It goes with filmCoefficient.', 'It goes with film coefficient.'],
])('a refusal is told in the words of the form: %s', (said, shown) => {
  expect(inFormWords(said, words)).toBe(shown)
})

test('a true minus stands before numbers, and days keep their hyphens', () => {
  expect(withMinus('from -5 to 2e-3 on 2026-03-31, slab-2, (-1)')).toBe(
    'from \u22125 to 2e\u22123 on 2026-03-31, slab-2, (\u22121)',
  )
})

test('a whole key is cut to its prefix, and a prefix is left', () => {
  expect(prefixOf(` soak_trial_AbC123${'x'.repeat(32)} `)).toBe('soak_trial_AbC123')
  expect(prefixOf('soak_trial_AbC123')).toBeUndefined()
  expect(prefixOf('req_0192f0aa11224433')).toBeUndefined()
  expect(shortId('req_0192f0aa11224433')).toBe('…11224433')
})

test('a symbol is parted into its letter and the low ones', () => {
  expect(partsOf('h, Tₐ')).toEqual([
    { text: 'h, T', low: false },
    { text: 'a', low: true },
  ])
})

test('an odd time stands with the seconds that were sent', () => {
  const years = timeMeasure(1e9)
  expect(sentTime(1e9, years)).toBe('31.6881 (1 × 10⁹ s)')
  expect(sentTime(1, years)).toBe('3.16881 × 10⁻⁸ (1 s)')
  expect(sentTime(7200, timeMeasure(36_000))).toBe('2')
  expect(sentTime(0, years)).toBe('0')
})
