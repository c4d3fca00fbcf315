import { describe, expect, it } from 'vitest'
import type { Problem } from '../../../../shared/api/common'
import { isKept, outcomeOf, refusedOutcome } from '../../../../utils/upload/outcome'
import { findingsWaiting, receipt, type Sent } from '../../../../utils/upload/receipt'

const version = { id: 412, axisTag: 'CAS-01.Z', number: 9 }
const problem = (status: number, over: Partial<Problem> = {}): Problem => ({ type: 'about:blank', title: '', status, detail: 'said by the vault', code: 'x', ...over })

describe('the answer to an upload', () => {
  it('with findings is a version, and counts those that nobody has explained', () => {
    expect(outcomeOf({ version, findings: [{ id: 33, state: 'open' }, { id: 34, state: 'explained' }] })).toEqual({ kind: 'version', versionId: 412, tag: 'CAS-01.Z', number: 9, findings: 1 })
  })
  it('with a sighting is one', () => {
    expect(outcomeOf({ version, sighting: { id: 1, at: '2026-12-01T07:00:00.000Z' } })).toEqual({ kind: 'seen', tag: 'CAS-01.Z', number: 9 })
  })
  it('with a tray is kept there', () => {
    expect(outcomeOf({ tray: 5, problem: 'serial-unknown', detail: 'Not registered' })).toEqual({ kind: 'tray', trayId: 5, detail: 'Not registered' })
  })
  it('of another shape is an error, not a version', () => {
    expect(() => outcomeOf({ version: { id: 'x' } })).toThrow()
  })
})

describe('a refusal', () => {
  it('of an unreadable file is kept in the tray', () => {
    expect(refusedOutcome(problem(422, { code: 'settings-unreadable', tray: 6 }))).toEqual({ kind: 'unreadable', trayId: 6, detail: 'said by the vault' })
  })
  it('of another kind says what the vault said', () => {
    expect(refusedOutcome(problem(422))).toEqual({ kind: 'refused', status: 422, why: 'said by the vault', again: false })
  })
  it.each([[0, true], [413, false], [415, false], [403, false], [401, true], [429, true], [503, true], [507, true]])('%i keeps nothing; worth another try: %s', (status, again) => {
    const outcome = refusedOutcome(problem(status))
    expect(outcome).toMatchObject({ kind: 'refused', again })
    expect(isKept(outcome)).toBe(false)
  })
})

describe('the receipt', () => {
  const sent: Sent[] = [
    { name: 'cas-01-z.json', forecast: 9, outcome: { kind: 'version', versionId: 412, tag: 'CAS-01.Z', number: 9, findings: 1 } },
    { name: 'lid-01-z.json', forecast: 12, outcome: { kind: 'version', versionId: 413, tag: 'LID-01.Z', number: 13, findings: 1 } },
    { name: 'lid-02-c.json', forecast: 8, outcome: { kind: 'seen', tag: 'LID-02.C', number: 7 } },
    { name: 'new-unit.json', forecast: null, outcome: { kind: 'tray', trayId: 5, detail: 'Not registered' } },
    { name: 'big.json', forecast: null, outcome: { kind: 'refused', status: 413, why: 'Too large', again: false } },
  ]

  it('has one line a kind, in order, and says where to go on', () => {
    expect(receipt(sent).map(line => [line.kind, line.count])).toEqual([['version', 2], ['seen', 1], ['tray', 1], ['refused', 1]])
    expect(receipt(sent)[2]?.entries[0]).toEqual({ text: 'place new-unit.json', to: '/tray#tray-5', why: 'Not registered' })
  })

  it('says so where the number is not the foretold one', () => {
    expect(receipt(sent)[0]?.entries.map(entry => entry.why)).toEqual([null, 'not v12: another upload came in between'])
  })

  it('counts findings', () => {
    expect(findingsWaiting(sent)).toBe('2 findings wait for an explanation')
    expect(findingsWaiting([])).toBeNull()
  })
})
