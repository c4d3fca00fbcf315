import { describe, expect, it } from 'vitest'
import { listExample, readList } from '../../../../utils/places/list'
import { bodyOfStep, planInWords, planList, type Known } from '../../../../utils/places/list-plan'

const nothing: Known = { sites: [], lines: [], machines: [], axes: [], units: [] }
const since = '2026-12-01T08:00:00.000Z'
const plan = (text: string, known = nothing) => planList(readList(text).rows, known, 'Europe/Berlin', since)

describe('a list of what stands where', () => {
  it('is read as the example has it', () => {
    const { rows, errors } = readList(listExample)
    expect(errors).toEqual([])
    expect(rows[0]).toEqual({
      at: 2, site: 'North hall', line: 'Line 1', machine: 'LID-01',
      axis: { tag: 'LID-01.Z', axisKind: 'linear', role: 'seat lid', flags: ['gravity', 'press'], bus: 'bus 1', uploadEveryHours: 24 },
      unit: { serial: 'HL40-24-00887', model: 'HL40-200V', firmware: '3.12' },
    })
  })

  it('may be cut by semicolons, have its columns in another order, and begin with a mark', () => {
    const { rows, errors } = readList('\uFEFFTag;Machine;Line;Kind;Site\nA.Z;M;L;Linear;S\n')
    expect(errors).toEqual([])
    expect(rows[0]).toMatchObject({ site: 'S', line: 'L', machine: 'M', axis: { tag: 'A.Z', axisKind: 'linear', uploadEveryHours: null }, unit: null })
  })

  it('means the only site where it names none', () => {
    expect(readList('line,machine,tag,kind\nL,M,A.Z,linear', 'North hall')).toMatchObject({ rows: [{ site: 'North hall' }], errors: [] })
    expect(readList('line,machine,tag,kind\nL,M,A.Z,linear').errors).toEqual([{ at: 2, message: 'site: needed' }])
  })

  it('names every error with its line', () => {
    expect(readList('line,machine\nL,M').errors).toEqual([{ at: 1, message: expect.stringContaining('lacks tag, kind') }])
    const { errors } = readList('site,line,machine,tag,kind,flags,due,serial,colour\nS,L,M,A Z,sliding,heavy,soon,,red\nS,L,M,B.Z,linear,,,HL1,\nS,L,M,b.z,linear,,,,')
    expect(errors).toEqual([
      { at: 1, message: expect.stringContaining('Not known: colour') },
      { at: 2, message: 'tag: 1 to 32 of A-Z a-z 0-9 . _ -' },
      { at: 2, message: 'kind: one of linear, rotary' },
      { at: 2, message: 'flags: any of gravity, press, collision' },
      { at: 2, message: 'due: whole hours, 1 to 8760, or empty' },
      { at: 3, message: 'model: Needed' },
      { at: 4, message: 'tag b.z stands on line 3 already' },
    ])
  })
})

describe('what a list registers', () => {
  it('is each place once, then axes, units and fittings, in the order in which it must be done', () => {
    const { steps, notes } = plan(listExample)
    expect(steps.map(step => step.kind)).toEqual(['site', 'line', 'machine', 'axis', 'axis', 'unit', 'unit', 'fitting', 'fitting'])
    expect(planInWords(steps)).toBe('1 site, 1 line, 1 machine, 2 axes, 2 units, 2 fittings')
    expect(notes).toEqual([])
  })

  it('puts ids in as they become known, and waits for those that are not', () => {
    const { steps, ids } = plan(listExample)
    const line = steps.find(step => step.kind === 'line')
    expect(line && bodyOfStep(line, ids)).toBeUndefined()
    expect(line && bodyOfStep(line, new Map([['site › north hall', 7]]))).toEqual({ name: 'Line 1', siteId: 7 })
  })

  it('uses what is there by any spelling of capitals, and changes nothing of it', () => {
    const known: Known = {
      sites: [{ id: 1, rev: 1, name: 'north hall', timeZone: 'UTC', fourEyes: true, releaseHours: 24, knownGoodMonths: 12, watched: [] }],
      lines: [{ id: 2, rev: 1, siteId: 1, name: 'Line 1' }], machines: [{ id: 3, rev: 1, lineId: 2, name: 'LID-01' }],
      axes: [{ id: 4, tag: 'lid-01.z', serial: 'HL40-24-00887' }], units: [{ id: 5, serial: 'HL40-24-00887', channel: null, axis: { id: 4, tag: 'LID-01.Z' } }],
    }
    const { steps, notes, ids } = plan(listExample, known)
    expect(planInWords(steps)).toBe('1 axis, 1 unit, 1 fitting')
    expect(notes).toEqual([{ at: 2, message: 'LID-01.Z is registered already and stays as it is' }])
    const axis = steps.find(step => step.kind === 'axis')
    expect(axis && bodyOfStep(axis, ids)).toMatchObject({ tag: 'LID-01.R', machineId: 3 })
  })

  it('leaves a swap to a person', () => {
    const elsewhere: Known = { ...nothing, axes: [{ id: 4, tag: 'X.Z', serial: 'HL40-24-00887' }], units: [{ id: 5, serial: 'HL40-24-00887', channel: null, axis: { id: 4, tag: 'X.Z' } }] }
    expect(plan(listExample, elsewhere).notes).toEqual([{ at: 2, message: 'HL40-24-00887 sits at X.Z; fit it by hand' }])
    const occupied: Known = { ...nothing, axes: [{ id: 4, tag: 'LID-01.Z', serial: 'OLD-1' }] }
    expect(plan(listExample, occupied).notes).toContainEqual({ at: 2, message: 'OLD-1 sits at LID-01.Z; take it out by hand' })
  })
})
