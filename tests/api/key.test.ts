import { expect, test } from 'vitest'
import { checksum, hashKey, isKey, newKey, prefixOf, withoutKeys } from '../../api/keys/key.ts'

test('the checksum is that of the published example', () => {
  expect(checksum('0123456789ABCDEFGHIJKLMNOPQRSTUV')).toBe('1ggZdL')
  expect(isKey('soak_trial_0123456789ABCDEFGHIJKLMNOPQRSTUV1ggZdL')).toBe(true)
  expect(isKey('soak_metered_0123456789ABCDEFGHIJKLMNOPQRSTUV1ggZdL')).toBe(true)
})

test('new keys are of the form, differ, and any misspelling is told', () => {
  const keys = new Set(Array.from({ length: 200 }, () => newKey('trial')))
  expect(keys.size).toBe(200)
  for (const key of keys) {
    expect(key).toMatch(/^soak_trial_[0-9A-Za-z]{38}$/)
    expect(isKey(key)).toBe(true)
    for (let at = 11; at < key.length; at += 3)
      expect(isKey(key.slice(0, at) + (key[at] === 'a' ? 'b' : 'a') + key.slice(at + 1))).toBe(false)
  }
})

test('digits are drawn evenly', () => {
  const counts = new Map<string, number>()
  for (let n = 0; n < 600; n++)
    for (const digit of newKey('trial').slice(11, 43)) counts.set(digit, (counts.get(digit) ?? 0) + 1)
  expect(counts.size).toBe(62)
  for (const count of counts.values()) expect(Math.abs(count - 310)).toBeLessThan(110)
})

test('a key is shown by its first six characters and kept as a hash', () => {
  const key = newKey('trial')
  expect(prefixOf(key)).toBe(`${key.slice(0, 17)}…`)
  expect(hashKey(key)).toHaveLength(32)
  expect(withoutKeys(`a ${key}, and ${key}.`)).toBe(`a ${prefixOf(key)}, and ${prefixOf(key)}.`)
})
