import { describe, expect, it } from 'vitest'
import type { ValuesAnswer, ValueStep } from '../../../../shared/api/values'
import { firstPlace, valueChoices, whereChoices, whereKey, whereOf } from '../../../../utils/value-choices'
import { farLimits, placeTitle, sisterOf, sistersToday, stepNumber, stepsOf, valuesCount, valuesSentence } from '../../../../utils/words/values'
import { diffContents } from '../../../../shared/diff/diff'
import { after, before, nameplate } from '../../../support/axis-answers'

const context = { axisKind: 'linear', nameplate } as const
const step = (number: number, at: string, value: ValueStep['value'], rest: Partial<ValueStep> = {}): ValueStep => ({
  versionId: number, number, at, capturedAt: at, value, unit: '%', before: { versionId: number - 1, number: number - 1, seenAt: at }, occasion: 'routine', changedBy: 'Tobias Achterberg', allowedBy: null,
  storedBy: 'station 2', reason: null, workOrder: null, serial: 'SN-1', model: 'HL40-200V', ...rest,
})
const answer: ValuesAnswer = {
  section: 'setup', field: 'thrustLimit', row: null, versions: 15, leftOut: 2,
  steps: [step(1, '2025-02-12T09:00:00.000Z', 34, { before: null }), step(4, '2025-06-03T12:22:00.000Z', 36), step(15, '2026-11-30T05:12:00.000Z', 55, { changedBy: null })],
  knownGood: [{ versionId: 4, number: 4, from: '2025-06-04T09:00:00.000Z', to: null, value: 36 }],
  bounds: [{ by: 'rule', max: 45, from: '2025-09-01T00:00:00.000Z', to: null, words: 'jars crack' }, { by: 'nameplate', max: 250, from: '2025-02-12T09:00:00.000Z', to: null, words: 'HL40-200V' }],
}
const day = (at: string) => at.slice(0, 10)
const until = Date.parse('2026-12-01T07:00:00.000Z')

describe('a value over time in words', () => {
  it('counts changes, and those that nobody is named for', () => {
    expect(valuesCount(answer)).toBe('2 changes in 15 versions, 1 by nobody named; 2 void versions left out')
    expect(valuesCount({ ...answer, steps: answer.steps.slice(0, 1), versions: 1, leftOut: 0 })).toBe('never changed in 1 version')
  })

  it('says in one paragraph what the picture shows', () => {
    expect(valuesSentence('Thrust limit of LID-03.Z', answer, '%', day)).toBe('Thrust limit of LID-03.Z: 34 % from 2025-02-12, 36 % since 2025-06-03, 55 % since 2026-11-30. Known-good is 36 %, v4. Site rule: at most 45. Nameplate: at most 250.')
    expect(valuesSentence('Home offset of LID-03.Z', { ...answer, steps: [] }, 'mm', day)).toBe('Home offset of LID-03.Z was never set.')
    expect(valuesSentence('Soft limits active of X', { ...answer, field: 'softLimitsActive', steps: [step(1, '2025-02-12T09:00:00.000Z', true, { before: null }), step(2, '2025-03-12T09:00:00.000Z', null)], knownGood: [], bounds: [] }, '', day))
      .toBe('Soft limits active of X: on from 2025-02-12, not set since 2025-03-12. No version is marked known-good.')
  })

  it('numbers changes from the oldest; the first reading is none', () => {
    expect(answer.steps.map(one => stepNumber(answer.steps, one))).toEqual([undefined, 1, 2])
  })

  it('becomes a picture: a balloon a change, filled where nobody is named, channels, limits', () => {
    const picture = stepsOf(answer, until, 'Europe/Vienna')
    expect(picture.points.map(({ value, balloon, hot }) => [value, balloon, hot])).toEqual([[34, undefined, false], [36, 1, false], [55, 2, true]])
    expect(picture.bands).toMatchObject([{ value: 36, to: until, label: 'known-good v4' }])
    expect(picture.limits.map(({ label }) => label)).toEqual(['site rule, at most 45', 'nameplate, at most 250'])
    expect(farLimits(picture, '%')).toBe('Too far off to draw: nameplate, at most 250 %.')
    expect(farLimits({ ...picture, limits: [] }, '%')).toBeUndefined()
  })

  it('takes the amount of a value that brings its own unit', () => {
    expect(stepsOf({ ...answer, section: 'extra', field: 'K-017', steps: [step(1, '2025-02-12T09:00:00.000Z', { value: 4, unit: 'ms' }, { before: null })] }, until, 'UTC').points[0]?.value).toBe(4)
  })
})

describe('what can be looked at over time', () => {
  it('is chosen by where it stands, then by name', () => {
    expect(whereChoices(after).slice(0, 3).map(({ label }) => label)).toEqual(['setup', 'move 0, Top, rest', 'move 1, Over lid'])
    for (const { value } of whereChoices(after)) expect(whereKey(whereOf(value))).toBe(value)
    expect(valueChoices('setup', after, context).map(({ label }) => label)).toContain('force: thrust limit')
    expect(valueChoices('setup', after, context).map(({ value }) => value)).not.toContain('modulo')
    expect(valueChoices('zone 1', after, context).map(({ value }) => value)).toEqual(['from', 'to'])
    expect(valueChoices('extra', after, context)).toEqual([{ value: 'K-017', label: 'filter step, drive’s own (K-017)' }])
  })

  it('begins with the heaviest change against the known-good, else with the thrust limit', () => {
    expect(firstPlace(diffContents(before, after, {}))).toEqual({ section: 'setup', field: 'thrustLimit' })
    expect(firstPlace([])).toEqual({ section: 'setup', field: 'thrustLimit' })
  })

  it('has a title in the trade’s words', () => {
    const titles = [{ section: 'setup', field: 'thrustLimit' }, { section: 'setup', field: 'homingSpeed' }, { section: 'move', field: 'target', row: 5 }] as const
    expect(titles.map(place => placeTitle(place, context))).toEqual(['Thrust limit', 'Homing speed', 'Target of move 5'])
  })
})

describe('sister axes', () => {
  const answer = (value: ValueStep['value']): ValuesAnswer => ({ section: 'setup', field: 'thrustLimit', row: null, steps: [step(1, '2026-01-01T00:00:00.000Z', 36, { before: null }), step(2, '2026-02-01T00:00:00.000Z', value)], knownGood: [], bounds: [], versions: 2, leftOut: 0 })
  it('are told by what they hold today, those alike together', () => {
    const sisters = [sisterOf('LID-01.Z', answer(38)), sisterOf('LID-02.Z', answer(40)), sisterOf('LID-04.Z', answer(38)), sisterOf('LID-05.Z', answer(null))]
    expect(sisters[0]?.points).toEqual([{ at: Date.parse('2026-01-01T00:00:00.000Z'), value: 36 }, { at: Date.parse('2026-02-01T00:00:00.000Z'), value: 38 }])
    expect(sistersToday(sisters, '%')).toBe('LID-01.Z, LID-04.Z 38 %; LID-02.Z 40 %; LID-05.Z not set')
    expect(sistersToday([], '%')).toBe('')
  })
})
