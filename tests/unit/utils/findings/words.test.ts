import { describe, expect, it } from 'vitest'
import type { Finding, FindingAct } from '../../../../shared/api/findings'
import { actSentence, besideAct, findingSentence, nextWords, plannedWords, planState } from '../../../../utils/findings/words'

const act: FindingAct = { kind: 'explained', at: '2026-12-01T06:00:00.000Z', by: 'Tobias Achterberg', text: 't', madeBy: null, madeAt: null, workOrder: null, plannedChangeId: null, as: null, allowedBy: null, version: null }
const shown = (tag: string) => ({ tag }) as Finding['versions'][number]

describe('a finding in a sentence', () => {
  const finding = { id: 12, cause: 'watched-change', weight: 'harm', tag: 'LID-02.Z', versions: [shown('LID-02.Z')], more: 0 } as unknown as Finding
  it('says what it is, how heavy and where', () => {
    expect(findingSentence(finding)).toBe('Finding 12: a watched value changed; harm; LID-02.Z')
    expect(findingSentence({ ...finding, versions: [shown('LID-02.Z'), shown('LID-02.Z')] })).toMatch(/LID-02\.Z$/)
    expect(findingSentence({ ...finding, cause: 'stop-check', versions: [shown('LID-02.Z'), shown('LID-03.Z')] })).toBe('Finding 12: a stop check; harm; 2 axes')
    expect(findingSentence({ ...finding, versions: [shown('A'), shown('B')], more: 98 })).toMatch(/100 axes$/)
    expect(findingSentence({ ...finding, cause: 'verification', tag: null, versions: [] })).toMatch(/the vault itself$/)
  })

  it('says what comes next, and who may', () => {
    expect(nextWords({ state: 'open', weight: 'text' })).toMatch(/Whoever knows, explains it/)
    expect(nextWords({ state: 'explained', weight: 'harm' })).toMatch(/^Explained\. An auditor/)
    expect(nextWords({ state: 'explained', weight: 'motion' })).toMatch(/^Explained\. A planner or an auditor/)
    expect(nextWords({ state: 'closed', weight: 'harm' })).toMatch(/can be reopened/)
  })
})

describe('what somebody did', () => {
  it.each([
    [{}, 'Tobias Achterberg explained'],
    [{ plannedChangeId: 4 }, 'Tobias Achterberg announced it before it was made'],
    [{ kind: 'closed', as: 'accepted', allowedBy: 'Marit' }, 'Tobias Achterberg closed it as accepted, allowed by Marit'],
    [{ kind: 'closed', as: 'put-right', version: { id: 9, tag: 'LID-02.Z', number: 9 } }, 'Tobias Achterberg closed it as put right by LID-02.Z v9'],
    [{ kind: 'reopened' }, 'Tobias Achterberg reopened it'],
  ] as [Partial<FindingAct>, string][])('%o: %s', (parts, words) => expect(actSentence({ ...act, ...parts })).toBe(words))

  it('names only what was said besides', () => {
    expect(besideAct(act, iso => iso)).toEqual([])
    expect(besideAct({ ...act, madeBy: 'night shift', madeAt: 'T', workOrder: 'WO-7' }, iso => `at ${iso}`)).toEqual([
      { label: 'Done by', value: 'night shift' }, { label: 'Done at', value: 'at T' }, { label: 'Work order', value: 'WO-7' },
    ])
  })
})

describe('an announced change', () => {
  it.each([
    [{ ranges: [{ field: 'thrustLimit', min: 40, max: 60 }] }, 'force: thrust limit, 40 to 60 %'],
    [{ ranges: [{ field: 'thrustLimit', min: null, max: 60 }] }, 'force: thrust limit, at most 60 %'],
    [{ ranges: [{ field: 'extra:K-017', min: 3, max: null }] }, 'the drive’s own K-017, at least 3'],
    [{ ranges: [{ field: 'thrustLimit', min: 40, max: 60 }, { field: 'unknownField', min: null, max: null }] }, 'force: thrust limit, 40 to 60 %; unknownField, any value'],
  ])('%o: %s', (plan, words) => expect(plannedWords(plan)).toBe(words))

  it('holds within its window, unless it was called off', () => {
    const plan = { from: '2026-12-01T06:00:00.000Z', until: '2026-12-01T14:00:00.000Z', endedAt: null }
    const at = (hour: string) => planState(plan, new Date(`2026-12-01T${hour}:00:00.000Z`))
    expect([at('05'), at('06'), at('13'), at('14')]).toEqual(['to come', 'holds', 'holds', 'over'])
    expect(planState({ ...plan, endedAt: plan.from }, new Date(plan.from))).toBe('called off')
  })
})
