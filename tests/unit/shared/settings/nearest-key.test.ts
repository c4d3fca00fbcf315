import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { setupFieldNames } from '../../../../shared/settings/fields'
import { editDistance, nearestKey } from '../../../../shared/settings/nearest-key'

describe('editDistance', () => {
  // Levenshtein's distance; "kitten" and "sitting" is the example of nearly every textbook (common practice, no source).
  it.each([['kitten', 'sitting', 3], ['', '', 0], ['', 'abc', 3], ['abc', '', 3], ['abc', 'abc', 0], ['flaw', 'lawn', 2], ['ab', 'ba', 2]])('%s to %s is %d', (from, to, distance) => {
    expect(editDistance(from, to)).toBe(distance)
  })

  it('is a distance: symmetric, zero only for equals, no detour is shorter', () => {
    const word = fc.string({ unit: fc.constantFrom(...'abc'), maxLength: 7 })
    fc.assert(fc.property(word, word, word, (a, b, c) => {
      expect(editDistance(a, b)).toBe(editDistance(b, a))
      expect(editDistance(a, b) === 0).toBe(a === b)
      return editDistance(a, c) <= editDistance(a, b) + editDistance(b, c)
    }))
  })

  it('grows by at most one with each typing fault', () => {
    fc.assert(fc.property(fc.string({ maxLength: 12 }), fc.nat(), fc.string({ unit: fc.constantFrom('x'), minLength: 1, maxLength: 1 }), (word, at, sign) => {
      const index = at % (word.length + 1)
      return editDistance(word, word.slice(0, index) + sign + word.slice(index)) === 1 && editDistance(word, word.slice(0, index) + word.slice(index + 1)) <= 1
    }))
  })
})

describe('nearestKey', () => {
  it.each([
    ['softlimitmax', 'softLimitMax'], ['softLimitMx', 'softLimitMax'], ['Speed_Limit', 'speedLimit'], ['payLoadMass', 'payloadMass'], ['homingmethod', 'homingMethod'],
    ['brakeReleasDelay', 'brakeReleaseDelay'], ['JERK', 'jerk'],
  ])('%s means %s', (key, meant) => expect(nearestKey(key, setupFieldNames)).toBe(meant))

  it.each(['colour', 'x', '', 'torque', 'k'.repeat(65)])('%s means nothing that is known', key => expect(nearestKey(key, setupFieldNames)).toBeUndefined())

  it('does not choose between two that are equally near', () => {
    expect(nearestKey('softLimitM', setupFieldNames)).toBeUndefined()
    expect(nearestKey('ac', ['ab', 'ad', 'abcd'])).toBeUndefined()
    expect(nearestKey('ab', ['ad', 'ab'])).toBe('ab')
  })

  it('finds every field from its name with one letter missing, where only one is that near', () => {
    for (const name of setupFieldNames) {
      const typed = name.slice(0, 2) + name.slice(3)
      expect([name, undefined]).toContain(nearestKey(typed, setupFieldNames))
    }
  })
})
