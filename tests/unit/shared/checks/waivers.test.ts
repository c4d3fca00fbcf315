import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { blocksKnownGood } from '../../../../shared/checks/blocks'
import { judge } from '../../../../shared/checks/judge'
import type { CheckResult, JudgeInput, Judgement } from '../../../../shared/checks/types'
import { applyWaivers, coverOf, type Covered, type Waiver } from '../../../../shared/checks/waivers'
import type { Content } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, limits, linear, plate, press, relative } from '../../../support/check-input'

const now = Date.UTC(2026, 10, 30, 8, 15)
const axisId = 7
const judged = (content: Content, rest: Partial<JudgeInput> = {}) => judge(judgeInput(content, { nameplate: plate({ maxSpeed: 800, maxAcceleration: 5000 }), ...rest }))
const only = (results: readonly CheckResult[]): Judgement => ({ ruleSet: '1', results, judged: [], notApplicable: [] })

function waiverOf(result: CheckResult, content: Content, rest: Partial<Waiver> = {}): Waiver {
  return { id: 1, axisId, rule: result.rule, covers: coverOf(result, content)!, ...rest }
}

/** What still stands of a later content under a waiver of the first stop of an earlier one. */
function standing(waived: Content, later: Content, rest: Partial<JudgeInput> = {}, waiver: Partial<Waiver> = {}): string[] {
  const stop = judged(waived, rest).results.find(({ level }) => level === 'stop')!
  const { judgement } = applyWaivers(judged(later, rest), later, axisId, [waiverOf(stop, waived, waiver)], now)
  return judgement.results.filter(({ level }) => level === 'stop').map(({ rule }) => rule)
}

// Move 1 ends at 205 mm, 7 mm beyond the soft limit of 198 mm.
const beyond = linear(limits, [absolute(1, 205)])

describe('a waived stop', () => {
  it('is accepted as long as the values at its places stay', () => {
    const judgement = judged(beyond)
    const waiver = waiverOf(judgement.results[0]!, beyond)
    const { judgement: left, accepted } = applyWaivers(judgement, beyond, axisId, [waiver], now)
    expect(waiver.covers).toEqual({ level: 'stop', values: [{ place: '/moves/move 1/target', value: 205 }, { place: '/setup/softLimitMax', value: 198 }] })
    expect(accepted).toEqual([{ result: judgement.results[0], waiver }])
    expect(blocksKnownGood(judgement, [])).toHaveLength(1)
    expect(blocksKnownGood(left, [])).toEqual([])
    expect(left).toEqual({ ...judgement, results: judgement.results.slice(1) })
  })

  it('stands again with the smallest change of one of them, for better or worse', () => {
    expect(standing(beyond, linear(limits, [absolute(1, 205.000001)]))).toEqual(['target-inside'])
    expect(standing(beyond, linear(limits, [absolute(1, 204)]))).toEqual(['target-inside'])
    expect(standing(beyond, linear({ ...limits, softLimitMax: 197 }, [absolute(1, 205)]))).toEqual(['target-inside'])
  })

  it('does not mind what else changes', () => {
    expect(standing(beyond, linear({ ...limits, jogSpeed: 5 }, [absolute(1, 205, { speed: 100, label: 'Far' }), absolute(2, 10)]))).toEqual([])
  })

  it('goes with the number of a row, not with its place in the table', () => {
    expect(standing(beyond, linear(limits, [absolute(0, 10), absolute(1, 205)]))).toEqual([])
    // Another row now stands first and goes just as far: that was never accepted.
    expect(standing(beyond, linear(limits, [absolute(0, 205), absolute(1, 205)]))).toEqual(['target-inside'])
  })

  it('hangs on where the row starts: a chain that comes from 190 instead of 180 is another stop', () => {
    const from = (start: number) => linear(limits, [absolute(1, start, { next: 2 }), relative(2, 20)])
    expect(standing(from(180), from(180))).toEqual([])
    expect(standing(from(180), from(190))).toEqual(['target-inside'])
  })

  it('ends at its instant: held a millisecond before, over from then on', () => {
    expect(standing(beyond, beyond, {}, { until: now + 1 })).toEqual([])
    expect(standing(beyond, beyond, {}, { until: now })).toEqual(['target-inside'])
    expect(standing(beyond, beyond, {}, { until: now - 1 })).toEqual(['target-inside'])
  })

  it('holds for its axis and rule only', () => {
    expect(standing(beyond, beyond, {}, { axisId: 8 })).toEqual(['target-inside'])
    expect(standing(beyond, beyond, {}, { rule: 'press-path' })).toEqual(['target-inside'])
  })

  it('of a rule of the site does not cover another rule at the same place', () => {
    const rule = (id: number) => ({ id, scope: 'site', field: 'jogSpeed', max: 10, reason: 'narrow' }) as const
    const content = linear({ ...limits, jogSpeed: 25 })
    const stop = judged(content, { rules: [rule(1)] }).results.find(({ level }) => level === 'stop')!
    const both = judged(content, { rules: [rule(1), rule(2)] })
    expect(applyWaivers(both, content, axisId, [waiverOf(stop, content)], now).judgement.results.filter(({ level }) => level === 'stop').map(({ values }) => values.ruleId)).toEqual([2])
  })

  it('without a place goes by what the result told: another model is another stop', () => {
    const unit = (model: string) => ({ unit: { model }, registered: { model: 'HL40-200V' } })
    const content = linear(limits)
    const stop = judged(content, unit('HR16')).results.find(({ rule }) => rule === 'unit-matches')!
    const left = (model: string) => applyWaivers(judged(content, unit(model)), content, axisId, [waiverOf(stop, content)], now).judgement.results.map(({ rule }) => rule)
    expect(left('HR16')).not.toContain('unit-matches')
    expect(left('HR40')).toContain('unit-matches')
  })

  it('covers a value that is not set, a zone, a whole row and a key of the drive', () => {
    const content = linear({}, [absolute(3, 5)], { zones: [{ zone: 2, from: 1, to: 4 }], extra: { 'a/b': { value: 3, unit: 'A' } } })
    const result: CheckResult = { rule: 'r', level: 'stop', message: '.', values: { any: 1 }, at: ['/setup/modulo', '/zones/0/to', '/moves/0', '/moves/9/speed', '/extra/a~1b', '/axisKind'] }
    expect(coverOf(result, content)).toEqual({ level: 'stop', values: [
      { place: '/setup/modulo', value: null }, { place: '/zones/zone 2/to', value: 4 },
      { place: '/moves/move 3', value: '[["acceleration",2000],["kind","absolute"],["move",3],["speed",250],["target",5]]' },
      { place: '/moves/move 9/speed', value: null }, { place: '/extra/a/b', value: { value: 3, unit: 'A' } }, { place: '/axisKind', value: 'linear' },
    ] })
    const made = waiverOf(result, content)
    const values = made.covers.level === 'stop' ? made.covers.values : []
    const under = (one: readonly Covered[]) => applyWaivers(only([result]), content, axisId, [{ ...made, covers: { level: 'stop', values: one } }], now).accepted.length
    // As it may come back over the wire: other orders, same values.
    expect(under(values.map(one => one.place === '/extra/a/b' ? { ...one, value: { unit: 'A', value: 3 } } : one).reverse())).toBe(1)
    expect(under(values.slice(1))).toBe(0)
    expect(under([])).toBe(0)
  })
})

describe('a waived unknown', () => {
  const content = linear({ softLimitMin: 0 }, [absolute(1, 50), press(2, 100, 150)])
  const unknowns = judged(content).results.filter(result => result.level === 'unknown' && coverOf(result, content))

  it('of a stop rule holds for the axis, whatever the values become', () => {
    const waivers = unknowns.map((result, id) => waiverOf(result, content, { id }))
    const later = linear({ softLimitMin: 3 }, [absolute(1, 60), press(2, 90, 150)])
    const { judgement, accepted } = applyWaivers(judged(later), later, axisId, waivers, now)
    expect(accepted.map(({ result }) => result.rule)).toEqual(unknowns.map(({ rule }) => rule))
    expect(blocksKnownGood(judgement, ['gravity', 'press'])).toEqual([])
  })

  it('does not cover a stop, nor something else that is missing later', () => {
    const span = unknowns.find(({ rule }) => rule === 'travel-span')!
    const waiver = waiverOf(span, content)
    expect(waiver.covers).toEqual({ level: 'unknown', missing: ['softLimitMax'] })
    const left = (later: Content) => applyWaivers(judged(later), later, axisId, [waiver], now).judgement.results.filter(({ rule }) => rule === 'travel-span').map(({ level }) => level)
    expect(left(content)).toEqual([])
    expect(left(linear({ softLimitMin: 0, softLimitMax: -5 }))).toEqual(['stop'])
    expect(left(linear())).toEqual(['unknown'])
  })

  it('is not needed for warnings, notes and rules that never stop', () => {
    const result = (level: CheckResult['level'], rule: string): CheckResult => ({ rule, level, at: [], message: '.', values: {}, missing: ['x'] })
    expect(coverOf(result('warn', 'press-speed'), content)).toBeUndefined()
    expect(coverOf(result('note', 'relative-step'), content)).toBeUndefined()
    expect(coverOf(result('unknown', 'select-reach'), content)).toBeUndefined()
    expect(coverOf(result('unknown', 'travel-span'), content)).toEqual({ level: 'unknown', missing: ['x'] })
  })
})

describe('laws', () => {
  it('loses and adds nothing: standing and accepted are the judgement, and without waivers all stands', () => {
    fc.assert(fc.property(arbitraryContent({ most: 8 }), fc.array(fc.boolean(), { minLength: 40, maxLength: 40 }), (content, picks) => {
      const judgement = judged(content)
      const waivers = judgement.results.filter((result, index) => picks[index % 40] && coverOf(result, content)).map((result, id) => waiverOf(result, content, { id }))
      const { judgement: left, accepted } = applyWaivers(judgement, content, axisId, waivers, now)
      expect([...left.results, ...accepted.map(({ result }) => result)].sort(byMessage)).toEqual([...judgement.results].sort(byMessage))
      for (const { result } of accepted) expect(['stop', 'unknown']).toContain(result.level)
      expect(applyWaivers(judgement, content, axisId, [], now)).toEqual({ judgement, accepted: [] })
    }))
  })

  it('accepts every stop by its own waiver, on the content that it was made for', () => {
    fc.assert(fc.property(arbitraryContent({ most: 8 }), (content) => {
      const judgement = judged(content)
      const waivers = judgement.results.filter(({ level }) => level === 'stop').map((result, id) => waiverOf(result, content, { id }))
      expect(applyWaivers(judgement, content, axisId, waivers, now).judgement.results.filter(({ level }) => level === 'stop')).toEqual([])
    }))
  })
})

function byMessage(one: CheckResult, other: CheckResult): number {
  return `${one.rule}${one.message}` < `${other.rule}${other.message}` ? -1 : 1
}
