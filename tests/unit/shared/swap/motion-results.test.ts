import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { standingResults } from '../../../../shared/swap/motion-results'

describe('results of the first motion', () => {
  it('the newest of an item holds, in the order in which the items were first tried', () => {
    const given = [{ item: 'jog', outcome: 'ok' }, { item: 'chain-5', outcome: 'fault' }, { item: 'move-0', outcome: 'ok' }, { item: 'chain-5', outcome: 'ok' }]
    expect(standingResults(given)).toEqual([{ item: 'jog', outcome: 'ok' }, { item: 'chain-5', outcome: 'ok' }, { item: 'move-0', outcome: 'ok' }])
  })

  it('answers each item once, with the last that was said of it', () => {
    fc.assert(fc.property(fc.array(fc.record({ item: fc.constantFrom('jog', 'move-1', 'move-2', 'chain-3'), at: fc.nat() })), (given) => {
      const standing = standingResults(given)
      expect(standing.map(({ item }) => item)).toEqual([...new Set(given.map(({ item }) => item))])
      expect(standing.every(result => result === given.findLast(({ item }) => item === result.item))).toBe(true)
    }))
  })
})
