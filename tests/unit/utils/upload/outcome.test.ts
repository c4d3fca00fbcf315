import { describe, expect, it } from 'vitest'
import { isKept, outcomeOf } from '../../../../utils/upload/outcome'
import { findingsOpened, receipt, type Sent } from '../../../../utils/upload/receipt'

const version = { id: 412, axisTag: 'CAS-01.Z', number: 9 }

describe('the answer to an upload', () => {
  it('201 is a version with its findings', () => {
    expect(outcomeOf(201, { version, findings: [{ id: 33, state: 'open' }] })).toEqual({ kind: 'version', versionId: 412, tag: 'CAS-01.Z', number: 9, findings: 1 })
  })
  it('200 is a sighting', () => {
    expect(outcomeOf(200, { version, sighting: { id: 1, at: '2026-12-01T07:00:00.000Z' } })).toEqual({ kind: 'seen', tag: 'CAS-01.Z', number: 9 })
  })
  it('202 is the tray', () => {
    expect(outcomeOf(202, { tray: 5, problem: 'serial-unknown', detail: 'Not registered' })).toEqual({ kind: 'tray', trayId: 5, detail: 'Not registered' })
  })
  it('422 with the tray is kept, unreadable', () => {
    expect(outcomeOf(422, { code: 'settings-unreadable', tray: 6, detail: '3 errors' })).toEqual({ kind: 'unreadable', trayId: 6, detail: '3 errors' })
  })
  it('another 422 is refused', () => {
    expect(outcomeOf(422, { code: 'input', detail: 'occasion: not known' })).toMatchObject({ kind: 'refused', why: 'occasion: not known', again: false })
  })
  it.each([[413, false], [415, false], [403, false], [401, true], [429, true], [503, true], [507, true]])('%i keeps nothing; worth another try: %s', (status, again) => {
    const outcome = outcomeOf(status, null)
    expect(outcome).toMatchObject({ kind: 'refused', again })
    expect(isKept(outcome)).toBe(false)
  })
  it('an answer of another shape is an error, not a version', () => {
    expect(() => outcomeOf(201, { version: { id: 'x' } })).toThrow()
  })
})

describe('the receipt', () => {
  const sent: Sent[] = [
    { name: 'cas-01-z.json', forecast: 9, outcome: { kind: 'version', versionId: 412, tag: 'CAS-01.Z', number: 9, findings: 1 } },
    { name: 'lid-01-z.json', forecast: 12, outcome: { kind: 'version', versionId: 413, tag: 'LID-01.Z', number: 13, findings: 1 } },
    { name: 'lid-02-c.json', forecast: 8, outcome: { kind: 'seen', tag: 'LID-02.C', number: 7 } },
    { name: 'new-unit.json', forecast: null, outcome: { kind: 'tray', trayId: 5, detail: 'Not registered' } },
    { name: 'big.json', forecast: null, outcome: { kind: 'refused', why: 'Too large', again: false } },
  ]

  it('has one line a kind, in order, and says where to go on', () => {
    expect(receipt(sent).map(line => [line.kind, line.count])).toEqual([['version', 2], ['seen', 1], ['tray', 1], ['refused', 1]])
    expect(receipt(sent)[2]?.entries[0]).toEqual({ text: 'place new-unit.json', to: '/tray#tray-5', why: 'Not registered' })
  })

  it('says so where the number is not the foretold one', () => {
    expect(receipt(sent)[0]?.entries.map(entry => entry.why)).toEqual([null, 'not v12: another upload came in between'])
  })

  it('counts findings', () => {
    expect(findingsOpened(sent)).toBe('2 findings opened')
    expect(findingsOpened([])).toBeNull()
  })
})
