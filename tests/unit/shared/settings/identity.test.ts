import { describe, expect, it } from 'vitest'
import { serialKey } from '../../../../shared/settings/identity'

describe('serialKey', () => {
  it.each([['HL40-2231-0087', 'hl40-2231-0087'], ['hl40/a_b.c', 'hl40/a_b.c'], ['IIII', 'iiii']])('of %s is %s', (serial, key) => expect(serialKey(serial)).toBe(key))

  it('is its own key', () => {
    for (const serial of ['A1', 'a1', 'Z-9_/x.']) expect(serialKey(serialKey(serial))).toBe(serialKey(serial))
  })
})
