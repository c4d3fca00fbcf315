import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isOlderFirmware } from '../../../../shared/checks/firmware'

describe('isOlderFirmware', () => {
  it.each([['2.9', '2.14'], ['2', '2.1'], ['V1.04-b', 'v1.10'], ['A2.1', 'A10.0'], ['1.09', '1.10']])('%s comes before %s', (one, other) => {
    expect(isOlderFirmware(one, other)).toBe(true)
    expect(isOlderFirmware(other, one)).toBe(false)
  })

  it.each([['2.14', '2.14'], ['A2', 'B1'], ['B1', 'A2'], ['2.1', '2.x'], ['1.09', '1.9']])('%s and %s have no order', (one, other) => {
    expect(isOlderFirmware(one, other)).toBe(false)
  })

  it('never holds both ways', () => {
    const revision = fc.string({ unit: fc.constantFrom(...'019.-aB'), maxLength: 8 })
    fc.assert(fc.property(revision, revision, (one, other) => {
      expect(isOlderFirmware(one, other) && isOlderFirmware(other, one)).toBe(false)
    }))
  })
})
