import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { byWeight } from '../../../../shared/diff/order'
import type { FieldChange } from '../../../../shared/diff/types'
import { weights, type Weight } from '../../../../shared/settings/types'

const change = (weight: Weight, at: number): FieldChange => ({ at: `/moves/${at}/target`, section: 'move', row: at, field: 'target', weight, watched: true })

describe('changes by weight', () => {
  it('are harm, then motion, then text, each in the order they came in', () => {
    const came = (['text', 'motion', 'harm', 'motion', 'harm', 'text'] as const).map(change)
    expect(byWeight(came).map(({ weight, row }) => `${weight} ${row}`)).toEqual(['harm 2', 'harm 4', 'motion 1', 'motion 3', 'text 0', 'text 5'])
  })

  it('are a stable sort of what came in, and leave that alone', () => {
    fc.assert(fc.property(fc.array(fc.constantFrom(...weights), { maxLength: 40 }), (names) => {
      const came = Object.freeze(names.map(change)) as FieldChange[]
      expect(byWeight(came)).toStrictEqual([...came].sort((a, b) => weights.indexOf(a.weight) - weights.indexOf(b.weight)))
      expect(came).toStrictEqual(names.map(change))
    }))
  })

  it('are none of none', () => {
    expect(byWeight([])).toEqual([])
  })
})
