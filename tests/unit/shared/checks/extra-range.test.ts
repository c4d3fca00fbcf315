import { describe, expect, it } from 'vitest'
import { extraRange } from '../../../../shared/checks/extra-range'
import type { DictionaryEntry } from '../../../../shared/settings/nameplate'
import type { ExtraValue } from '../../../../shared/settings/types'
import { judgeInput, linear, plate, told } from '../../../support/check-input'

const held = (value: ExtraValue, entry?: DictionaryEntry) => told(extraRange, judgeInput(
  linear({}, [], { extra: { 'K-017': value } }), { nameplate: plate({ dictionary: entry && { 'K-017': entry } }) }))

describe('extra-range', () => {
  it('is silent inside the range, its ends included', () => {
    const entry = { name: 'ripple filter', min: 0, max: 15 }
    expect(held(7, entry)).toEqual([])
    expect(held(0, entry)).toEqual([])
    expect(held(15, entry)).toEqual([])
  })

  it('stops outside, with the name and the unit of the dictionary', () => {
    expect(held(16, { name: 'ripple filter', unit: 'ms', max: 15 })).toEqual(['stop: K-017 (ripple filter) 16 ms is above the maximum of 15 ms.'])
    expect(held({ value: -1, unit: 'ms' }, { unit: 'ms', min: 0 })).toEqual(['stop: K-017 −1 ms is below the minimum of 0 ms.'])
    expect(held('high', { min: 0 })).toEqual(['stop: K-017 “high” is no number, as it has to be.'])
  })

  it('turns at the ends of the range: 0 and 15 pass, a millionth beyond does not', () => {
    const entry = { min: 0, max: 15 }
    expect([held(0, entry), held(15, entry)]).toEqual([[], []])
    expect([held(-0.000001, entry), held(15.000001, entry)].map(lines => lines.length)).toEqual([1, 1])
    expect([held(-1, { max: 15 }), held(16, { min: 0 })]).toEqual([[], []])
  })

  it('stops a value that is not among the allowed', () => {
    expect(held('B', { allowed: ['A', 'B'] })).toEqual([])
    expect(held('C', { allowed: ['A', 'B'] })).toEqual(['stop: K-017 “C” is none of the allowed “A” and “B”.'])
    expect(held(true, { allowed: [false] })).toEqual(['stop: K-017 on is none of the allowed off.'])
  })

  it('does not compare numbers of different units', () => {
    expect(held({ value: 3, unit: 'counts' }, { unit: 'ms', max: 1 })).toEqual(['unknown: K-017 in counts cannot be judged without K-017 in ms.'])
  })

  it('does not know without a nameplate', () => {
    const input = judgeInput(linear({}, [], { extra: { 'a/b': 1 } }))
    expect(extraRange.judge(input)).toMatchObject([{ level: 'unknown', missing: ['nameplate.dictionary'], at: ['/extra/a~1b'] }])
  })

  it('does not apply to keys without an entry, to readings, and to no keys at all', () => {
    expect(held(99)).toEqual(['not applicable'])
    expect(held(99, { reading: true, max: 1 })).toEqual(['not applicable'])
    expect(told(extraRange, judgeInput(linear()))).toEqual(['not applicable'])
    expect(told(extraRange, judgeInput(linear({}, [], { extra: { constructor: 1 } }), { nameplate: plate({ dictionary: {} }) }))).toEqual(['not applicable'])
  })
})
