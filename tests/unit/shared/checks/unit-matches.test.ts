import { describe, expect, it } from 'vitest'
import type { JudgeInput } from '../../../../shared/checks/types'
import { unitMatches } from '../../../../shared/checks/unit-matches'
import { judgeInput, linear, told } from '../../../support/check-input'

const matches = (rest: Partial<JudgeInput>, content = linear()) => told(unitMatches, judgeInput(content, rest))
const firmware = (file: string | undefined, good: string | undefined, held = linear(), content = linear()) =>
  matches({ unit: { model: 'HL40-200V', firmware: file }, knownGood: { firmware: good, content: held } }, content)

describe('unit-matches', () => {
  it('is silent for the registered type code', () => {
    expect(matches({})).toEqual([])
  })

  it('warns where only the stem is the same, stops where not even that is', () => {
    expect(matches({ unit: { model: 'HL40-300V' } })).toEqual(['warn: The file names HL40-300V, the unit is registered as HL40-200V: only HL40 is the same.'])
    expect(matches({ unit: { model: 'HL40-200' } })[0]).toMatch(/^warn/)
    expect(matches({ unit: { model: 'HL400-200V' } })).toEqual(['stop: The file names HL400-200V, the unit is registered as HL40-200V.'])
    expect(matches({ unit: { model: 'HR16' } })[0]).toMatch(/^stop/)
  })

  it('compares type codes to the last sign: another case or a suffix is another build, another stem another unit', () => {
    expect(matches({ unit: { model: 'HL40-200v' } })[0]).toMatch(/^warn/)
    expect(matches({ unit: { model: 'HL40-200V ' } })[0]).toMatch(/^warn/)
    expect(matches({ unit: { model: 'HL40' } })[0]).toMatch(/^warn/)
    expect(matches({ unit: { model: 'hl40-200V' } })[0]).toMatch(/^stop/)
    for (const separator of ['/', '.', '_', ' ']) expect(matches({ unit: { model: `HL40${separator}200V` } })[0]).toMatch(/^warn: .*: only HL40 is the same\.$/)
  })

  it('stops a file of the other axis kind', () => {
    const input = judgeInput(linear(), { axis: { axisKind: 'rotary', flags: [] } })
    expect(told(unitMatches, input)).toEqual(['stop: The file is for a linear axis, this axis is rotary.'])
    expect(unitMatches.judge(input)[0]!.at).toEqual(['/axisKind'])
  })

  it('does not know without a registered unit', () => {
    expect(matches({ registered: undefined })).toEqual(['unknown: The type code cannot be judged without registered.model.'])
  })

  it('warns of another firmware than the known-good’s, newer or older', () => {
    expect(firmware('2.14', '2.14')).toEqual([])
    expect(firmware('2.9', '2.14')).toEqual(['warn: The unit runs firmware 2.9, the known-good was made with 2.14.'])
    expect(firmware('3.0', '2.14')).toHaveLength(1)
  })

  it('stops an older one that lacks a key of the known-good', () => {
    const held = linear({ jogSpeed: 50, jerk: 9000 }, [], { extra: { 'K-017': 15, 'a/b': 'x' } })
    expect(firmware('2.9', '2.14', held, linear({ jogSpeed: 40 }, [], { extra: { 'K-017': 3 } }))).toEqual([
      'warn: The unit runs firmware 2.9, the known-good was made with 2.14.',
      'stop: Firmware 2.9 is older than the known-good\'s 2.14 and the file lacks jerk and a/b.',
    ])
    const older = judgeInput(linear(), { unit: { model: 'HL40-200V', firmware: '2.9' }, knownGood: { firmware: '2.14', content: linear({}, [], { extra: { 'a/b': 'x' } }) } })
    expect(unitMatches.judge(older)[1]).toMatchObject({ at: ['/extra/a~1b'], values: { lacking: ['a/b'] } })
  })

  it('only warns where the newer one lacks a key: 2.14 comes after 2.9', () => {
    expect(firmware('2.14', '2.9', linear({ jerk: 9000 }))).toEqual(['warn: The unit runs firmware 2.14, the known-good was made with 2.9.'])
  })

  it('does not know a firmware that the file leaves out, and asks none without a known-good', () => {
    expect(firmware(undefined, '2.14')).toEqual(['unknown: The firmware cannot be judged without unit.firmware.'])
    expect(firmware('2.9', undefined)).toEqual([])
    expect(matches({ unit: { model: 'HL40-200V', firmware: '1' } })).toEqual([])
  })
})
