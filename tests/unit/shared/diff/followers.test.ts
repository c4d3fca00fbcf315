import { describe, expect, it } from 'vitest'
import { followersOf } from '../../../../shared/diff/followers'

/* Moves 1 and 2 became 2 and 3, 5 is gone, 1 is new. */
const { agree, mapped } = followersOf([{ before: 0, after: 0 }, { after: 1 }, { before: 1, after: 2 }, { before: 2, after: 3 }, { before: 5 }])

describe('followers', () => {
  it('go along with the row that they call', () => {
    expect(mapped(1)).toBe(2)
    expect(mapped(5)).toBeUndefined()
    expect(mapped(9)).toBeUndefined()
  })

  const cases: readonly (readonly [was: number | undefined, is: number | undefined, same: boolean, why: string])[] = [
    [0, 0, true, 'the row kept its number'], [1, 2, true, 'it went along'], [1, 1, false, 'it calls the new row now'],
    [2, 2, false, 'it calls the row before now'], [5, 5, true, 'it still calls a number that no row has any more'],
    [5, 3, false, 'its row is gone, another came to the number'], [9, 9, true, 'no row on either side'], [9, 8, false, 'another number'],
    [undefined, undefined, true, 'none'], [1, undefined, false, 'none any more'], [undefined, 1, false, 'one now'],
  ]

  it.each(cases)('%s against %s: %s, %s', (was, is, same, why) => {
    expect(agree(was, is), why).toBe(same)
  })
})
