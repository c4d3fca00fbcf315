import { describe, expect, it } from 'vitest'
import type { LifeEvent } from '../../../../shared/api/versions'
import { changeTable } from '../../../../utils/words/change-table'
import { addressTwice } from '../../../../shared/checks/live/address-twice'
import { checkLines, checksSentence, liveMessage } from '../../../../utils/words/checks'
import { foldedRows } from '../../../../utils/words/folded-moves'
import { lifeLine } from '../../../../utils/words/life'
import { flatPairs, tellMoves } from '../../../../utils/words/moves-told'
import { missingWords, pointerWords } from '../../../../utils/words/pointer'
import { receiptWords } from '../../../../utils/words/receipt'
import { extraBlock, setupBlocks, zoneBlock } from '../../../../utils/words/setup-rows'
import { sideBySide } from '../../../../utils/words/side-by-side'
import { nextStep } from '../../../../utils/words/sign'
import { asIfToday } from '../../../../utils/words/standing'
import { taughtOf } from '../../../../utils/words/taught'
import { after, axis, before, changesAnswer, knownGood, nameplate, today } from '../../../support/axis-answers'

const answer = changesAnswer(before, after)
const context = { axisKind: 'linear', nameplate, before, after } as const

describe('changeTable', () => {
  const groups = changeTable(answer.told?.changes ?? [], context, today.checks, knownGood.checks)
  const lines = groups.flatMap(group => group.lines)
  const find = (label: string, place = '') => lines.find(line => line.label === label && line.place.includes(place))

  it('goes by weight, heaviest first, and leaves empty weights out', () => {
    expect(groups.map(group => group.weight)).toEqual(['harm', 'motion', 'text'])
  })
  it('puts newtons and the stop beside a raised thrust limit', () => {
    const line = find('thrust limit')
    expect(line).toMatchObject({ before: 38, after: 55, unit: '% of rated', numeric: true, of: { section: 'setup', field: 'thrustLimit' }, difference: '+17 points', means: '243.2 N became 352 N.' })
    expect(line?.checks.map(check => [check.level, check.rule])).toEqual([['stop', 'site-rule']])
  })
  it('tells a new row as one line with what it does', () => {
    expect(find('move 3 is new')).toMatchObject({ place: '98 to 104 mm, 36 % of rated', after: 'press', before: undefined, difference: 'added', numeric: false, of: null })
  })
  it('says how long a changed move takes', () => {
    expect(find('speed', 'move 1')?.means).toBe('Move 1 takes at least 0.333 s, was 0.353 s.')
  })
  it('writes a default beside the value that took its place, each with its unit', () => {
    expect(find('deceleration')).toMatchObject({ before: 'as acceleration', after: '2000 mm/s²', unit: '' })
  })
  it('is empty between equal versions', () => {
    expect(changeTable(changesAnswer(before, before).changes, context, [], [])).toEqual([])
  })
})

describe('foldedRows', () => {
  const told = tellMoves(before, after, answer.told?.pairs ?? [], answer.told?.changes ?? [], answer.renumbered)
  it('puts one line before the run, and holds its rows together', () => {
    const rows = foldedRows(told, new Set([0]), true)
    expect(rows.map(row => row.run ? 'run' : row.row.state)).toEqual(['same', 'changed', 'changed', 'new', 'run', 'moved', 'moved', 'moved', 'moved', 'moved'])
    expect(rows.flatMap(row => row.run ? [] : [row.bracket]).slice(4)).toEqual(['run first', 'run', 'run', 'run', 'run last'])
    expect(rows.some(row => !row.run && row.hidden)).toBe(false)
  })
  it('hides rows of a folded run and rows as before, never what changed', () => {
    const hidden = foldedRows(told, new Set(), false).flatMap(row => row.run || !row.hidden ? [] : [row.row.state])
    expect(hidden).toEqual(['same', 'moved', 'moved', 'moved', 'moved', 'moved'])
  })
  it('has no run where rows are read by number', () => {
    expect(foldedRows(tellMoves(before, before, flatPairs(before, before), [], []), new Set(), true).every(row => !row.run)).toBe(true)
  })
})

describe('checks in words', () => {
  it('gives each stop and warning a line with its places by name', () => {
    const lines = checkLines(today.checks, after, context)
    expect(lines.filter(line => line.level === 'stop')).toMatchObject([{ places: 'thrust limit', rules: ['site-rule'] }])
    expect(lines.find(line => line.rules.includes('select-reach'))?.places).toContain('move 8')
  })
  it('says what rules wait for by the words of the screens', () => {
    const waits = checkLines([{ rule: 'payload', level: 'unknown', at: [], message: '', values: {}, missing: ['payloadMass', 'nameplate.maxPayloadLevel'] }], after, context)
    expect(waits.map(line => line.message)).toEqual(['1 rule waits for payload and max payload level on the nameplate.'])
  })
  it('names what is missing in the words of the screens where a rule looks at several axes', () => {
    const [silent] = addressTwice.judge([{ tag: 'A', nodeAddress: 3 }, { tag: 'B' }])
    expect(silent && liveMessage(silent, context)).toBe('Whether B shares an address on this bus cannot be judged without node address.')
  })
  it('counts what speaks up and what is folded', () => {
    expect(checksSentence(today.checks, 12)).toMatch(/^1 stop, 1 warning; folded below: \d+ notes, \d+ not judged$/)
    expect(checksSentence([], 11)).toBe('11 rules judged, no stop and no warning')
    expect(checksSentence([], 0)).toBe('nothing to judge')
  })
})

describe('pointers in words', () => {
  it('names moves and zones by their number, not by their index', () => {
    expect(pointerWords('/moves/3/target', after, context)).toBe('move 3, target')
    expect(pointerWords('/moves/1', { ...after, moves: after.moves.slice(4) }, context)).toBe('move 5')
    expect(pointerWords('/zones/1/from', after, context)).toBe('zone 1, from')
    expect(pointerWords('/setup/thrustLimit', after, context)).toBe('thrust limit')
    expect(pointerWords('/extra/K-017', after, context)).toBe('filter step, drive’s own (K-017)')
    expect(pointerWords('/axisKind', after, context)).toBe('axis kind')
  })
  it('names what a nameplate lacks', () => {
    expect(missingWords('nameplate.ratedThrust', context)).toBe('rated thrust on the nameplate')
  })
})

describe('setup in blocks', () => {
  it('shows the known-good above where it differs, and keeps one that is gone', () => {
    const changes = changesAnswer(before, { ...after, setup: { ...after.setup, jogSpeed: undefined } }).changes
    const blocks = setupBlocks({ ...after, setup: { ...after.setup, jogSpeed: undefined } }, context, changes)
    expect(blocks.force.rows.find(row => row.key === 'thrustLimit')).toMatchObject({ value: 55, unit: '% of rated', change: { before: 38 } })
    expect(blocks.motion.rows.find(row => row.key === 'jogSpeed')).toMatchObject({ value: undefined, change: { before: 25 } })
    expect(blocks.motion.rows.find(row => row.key === 'inPositionWindow')?.unit).toBe('± mm')
    expect(blocks.motion.fraction).toBe(2)
  })
  it('tells zones by their ends and extra values by their dictionary', () => {
    expect(zoneBlock(after, context, []).rows.map(row => [row.label, row.value])).toEqual([['zone 0, from', 0], ['zone 0, to', 12], ['zone 1, from', 98], ['zone 1, to', 106]])
    expect(extraBlock(after, context, []).rows).toMatchObject([{ label: 'filter step, drive’s own (K-017)', value: 4 }])
  })
})

describe('sideBySide', () => {
  it('marks a row in which the axes that were read differ', () => {
    const rows = sideBySide([before, after, null]).flatMap(group => group.rows)
    expect(rows.find(row => row.key === 'thrustLimit')).toMatchObject({ values: [38, 55, null], differs: true })
    expect(rows.find(row => row.key === 'speedLimit')?.differs).toBe(false)
    expect(rows.find(row => row.key === 'speedLimit')).toMatchObject({ unit: 'mm/s', units: ['', '', ''] })
  })
  it('puts the unit beside each value where linear and rotary axes hold the same field', () => {
    const turning = { axisKind: 'rotary' as const, setup: { speedLimit: 720, modulo: 360 }, zones: [], moves: [], extra: {} }
    const rows = sideBySide([turning, before, null]).flatMap(group => group.rows)
    expect(rows.find(row => row.key === 'speedLimit')).toMatchObject({ unit: '', units: ['deg/s', 'mm/s', ''] })
    expect(rows.find(row => row.key === 'modulo')).toMatchObject({ unit: 'deg', units: ['', '', ''] })
  })
})

describe('lifeLine', () => {
  const event = (rest: Partial<LifeEvent>): LifeEvent => ({ at: '2026-11-30T05:12:00.000Z', kind: 'version', findingId: null, versionId: 15, number: 15, by: 'station 2', text: null, serial: null, changes: null, occasion: 'routine', sightings: null, ...rest })
  it('tells a version by what it changed and how often it was seen', () => {
    expect(lifeLine(event({ changes: { harm: 6, motion: 2, text: 0 }, sightings: 1 }))).toEqual({ what: 'v15, routine', beside: '6 harm, 2 motion against the version before; seen the same 1 time since; station 2', state: 'off', label: 'changed: 6 harm, 2 motion' })
  })
  it('tells a first version, a mark, a unit taken out', () => {
    expect(lifeLine(event({})).state).toBe('new')
    expect(lifeLine(event({ kind: 'mark', text: 'approved' }))).toMatchObject({ what: 'v15 marked known-good', beside: 'station 2; approved' })
    expect(lifeLine(event({ kind: 'finding', findingId: 3, number: null, text: 'thrust limit 38 → 55 %', by: '' }))).toMatchObject({ what: 'a finding was opened', beside: 'thrust limit 38 → 55 %', state: 'off' })
    expect(lifeLine(event({ kind: 'taken-out', number: null, serial: 'HL40-23-00392' }))).toMatchObject({ what: 'unit HL40-23-00392 taken out', state: 'never-read' })
  })
})

describe('other words of these pages', () => {
  it('says how a version stands to the known-good in force', () => {
    expect(asIfToday(axis, { answer })).toMatchObject({ status: 'off', sense: 'more' })
    expect(asIfToday(axis, null).status).toBe('in-line')
    expect(asIfToday({ ...axis, knownGood: null }, null).status).toBe('unmarked')
    expect(asIfToday(axis, { answer: { ...answer, compare: 'same' } }).status).toBe('in-line')
  })
  it('lists what is taught on any unit, and what on another model', () => {
    expect(taughtOf(before, nameplate.dictionary)).toEqual({ always: [], onOther: ['position gain', 'velocity gain', 'integral time'] })
    expect(taughtOf({ ...before, setup: { ...before.setup, homingMethod: 'current-position' } }, undefined).always).toEqual(['home offset'])
  })
  it('gives a receipt in one sentence', () => {
    expect(receiptWords({ rounded: 1, converted: 2, encoding: 'windows-1252', delimiter: ';', decimal: 'comma' })).toBe('Read as Windows-1252, cut at semicolons, decimal commas, 2 values converted from another unit, 1 value rounded to six decimals.')
  })
  it('says what to do after a refused signature', () => {
    expect(nextStep('four-eyes')).toContain('another planner')
    expect(nextStep('fault')).toBeUndefined()
  })
})
