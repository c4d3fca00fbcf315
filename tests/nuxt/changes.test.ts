import { mountSuspended } from '@nuxt/test-utils/runtime'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import { AxisHead, AxisLifeLine, AxisRail, AxisSignProblem, AxisStands, ChecksList, DiffBody, DiffMovesTable, DiffSummary, SettingsMovesTable, SettingsSetupGroups } from '#components'
import { ApiProblem } from '~/utils/api-problem'
import { moveColumns } from '~/utils/move-columns'
import { railInputOf, railSideOf } from '#shared/pictures/rail-input'
import { tellMoves } from '~/utils/words/moves-told'
import { after, axis, before, changesAnswer, knownGood, life, nameplate, today } from '../support/axis-answers'

/** Pictures wait for a width; this one is a desk's. */
class Measured implements ResizeObserver {
  constructor(private readonly tell: ResizeObserverCallback) {}
  observe(target: Element) {
    this.tell([{ contentRect: { width: 1200 }, target } as unknown as ResizeObserverEntry], this)
  }

  unobserve() { /* nothing is kept */ }
  disconnect() { /* nothing is kept */ }
}
beforeAll(() => {
  vi.stubGlobal('ResizeObserver', Measured)
})

const context = { axisKind: 'linear', nameplate } as const
const answer = changesAnswer(before, after)
const told = tellMoves(before, after, answer.told?.pairs ?? [], answer.told?.changes ?? [], answer.renumbered)
const words = (text: string) => text.replace(/\s+/g, ' ').trim()

describe('a comparison', () => {
  const view = { before: knownGood, after: today, answer, axis, nameplate, nameplateBefore: nameplate }

  it('says what was, what is, and what it does', async () => {
    const body = await mountSuspended(DiffBody, { props: { view } })
    const row = body.findAll('.chg tbody tr').find(one => one.text().includes('thrust limit'))
    expect(words(row?.text() ?? '')).toMatch(/before 38.*after 55.*% of rated.*\+17 points.*243\.2 N became 352 N\..*stop.*jars crack above 300 N/)
    expect(row?.get('th a').attributes('href')).toBe(`/history?field=thrustLimit&axis=${today.axisTag}`)
    expect(body.findAll('.chg tbody').map(group => group.attributes('aria-label'))).toEqual(['harm', 'motion', 'text'])
    expect(words(body.text())).toContain('9 rows, 8 before: 2 changed, 1 new, 5 under another number, 1 as before')
    expect(body.findAll('svg[role="img"]').map(picture => picture.attributes('aria-label')).filter(label => label?.includes('over time')).map(label => /Speed|Position|Thrust/.exec(label ?? '')?.[0])).toEqual(['Speed', 'Position', 'Thrust'])
  })

  it('says that nothing changed between equal versions', async () => {
    const body = await mountSuspended(DiffBody, { props: { view: { ...view, after: { ...knownGood, id: 16, number: 16 }, answer: changesAnswer(before, before) } } })
    expect(words(body.text())).toContain('Identical: every setting, zone and move is the same.')
    expect(words(body.text())).toContain('Nothing. Both hold the same settings, zones and moves')
    expect(body.find('.chg').exists()).toBe(false)
  })

  it('hands out both plain forms', async () => {
    const summary = await mountSuspended(DiffSummary, { props: { view, counts: { harm: 1, motion: 0, text: 0 } } })
    expect(summary.findAll('a').map(link => link.attributes('href'))).toEqual(['/api/versions/15/changes?against=14&form=text', '/api/versions/15/changes?against=14&form=json-patch'])
  })
})

describe('the told move table', () => {
  it('folds and unfolds the run that only moved, and keeps what changed', async () => {
    const table = await mountSuspended(DiffMovesTable, { props: { told, columns: moveColumns([...before.moves, ...after.moves], context) } })
    const hidden = () => table.findAll('tr.hidden').length
    const button = table.get('tr.fold button')
    expect(words(table.get('tr.fold').text())).toContain('Moves 3–7 became 4–8. Nothing else in them changed. Every call by these numbers now does something else.')
    expect([button.attributes('aria-expanded'), hidden()]).toEqual(['true', 0])
    await button.trigger('click')
    expect([table.get('tr.fold button').attributes('aria-expanded'), hidden()]).toEqual(['false', 5])
    expect(table.findAll('tr.changed:not(.hidden)')).toHaveLength(2)
  })

  it('says may have where the pairing is not sure', async () => {
    const unsure = { ...told, runs: told.runs.map(run => ({ ...run, renumbering: { ...run.renumbering, sure: false } })) }
    const table = await mountSuspended(DiffMovesTable, { props: { told: unsure, columns: [] } })
    expect(words(table.get('tr.fold').text())).toContain('Moves 3–7 may have become 4–8.')
  })
})

describe('one version', () => {
  it('tells of each move whether it is as known-good', async () => {
    const table = await mountSuspended(SettingsMovesTable, { props: { moves: after.moves, context, told, compared: true, title: 'Moves' } })
    expect(table.findAll('tbody svg').map(strip => strip.attributes('aria-label'))).toEqual(['in line', 'off', 'off', 'not in known-good', ...Array.from({ length: 5 }, () => 'in line, under another number')])
  })
  it('has no verdict where nothing is marked, and says so of an empty table', async () => {
    const table = await mountSuspended(SettingsMovesTable, { props: { moves: before.moves, context, compared: false, title: 'Moves' } })
    expect(new Set(table.findAll('tbody svg').map(strip => strip.attributes('aria-label')))).toEqual(new Set(['no known-good']))
    expect((await mountSuspended(SettingsMovesTable, { props: { moves: [], context, compared: false, title: 'Moves' } })).text()).toBe('The move table is empty.')
  })
  it('stands the known-good above a setup value that differs', async () => {
    const groups = await mountSuspended(SettingsSetupGroups, { props: { content: after, context, changes: answer.changes } })
    const row = groups.findAll('tr.ch').find(one => one.text().includes('thrust limit'))
    expect(words(row?.text() ?? '')).toBe('harm thrust limitbefore 38, after 55% of rated')
    expect(groups.findAll('h3').map(head => head.text())).toEqual(['travel', 'homing', 'force', 'motion', 'load', 'zones', 'tuning', 'io', 'bus', 'extra values'])
  })
  it('shows stops and warnings, folds the rest and says what was judged', async () => {
    const list = await mountSuspended(ChecksList, { props: { version: today, context } })
    expect(list.findAll('section > table tbody tr').map(row => row.get('.level').text())).toEqual(['stop', 'warn'])
    expect(words(list.text())).toContain('against nameplate revision 2')
    expect(words(list.text())).toContain('Checks help. They are no safety function.')
  })
})

describe('an axis', () => {
  it('says by what it is off, and in line without praise', async () => {
    expect(words((await mountSuspended(AxisHead, { props: { axis } })).get('p').text())).toMatch(/off its known-good by harm \d+ ?motion \d+/)
    const line = await mountSuspended(AxisHead, { props: { axis: { ...axis, status: 'in-line' } } })
    expect(words(line.get('p').text())).toContain('in line with its known-good v14')
  })
  it('says what to do next where something is missing', async () => {
    const never = { ...axis, status: 'never-read', current: null, knownGood: null } as const
    expect(words((await mountSuspended(AxisStands, { props: { axis: never, mayUpload: true } })).text())).toContain('Read what HL40-200V HL40-24-00817 holds with its drive tool, and upload the file: it becomes v1.')
    expect(words((await mountSuspended(AxisStands, { props: { axis: { ...never, unit: null }, mayUpload: true } })).text())).toContain('No unit is fitted here')
    expect(words((await mountSuspended(AxisStands, { props: { axis: { ...axis, status: 'unmarked' }, mayUpload: true } })).text())).toContain('No known-good.')
    expect((await mountSuspended(AxisStands, { props: { axis, mayUpload: true } })).text()).toBe('')
  })
  it('draws the rail with a sentence and its numbers', async () => {
    const rail = await mountSuspended(AxisRail, { props: { input: railInputOf({ upper: before }, { upper: railSideOf(before, 'today, v14') }, nameplate) } })
    expect(rail.get('svg[role="img"]').attributes('aria-label')).toContain('soft limits 2 and 185')
    expect(words(rail.get('.beside').text())).toBe('move 7 steps by −2 mm')
    expect(rail.findAll('details tbody tr')).toHaveLength(2 + 2 + 7 + 1)
  })
  it('draws its life with a sentence', async () => {
    const line = await mountSuspended(AxisLifeLine, { props: { tag: 'LID-03.Z', events: life, zone: 'Europe/Berlin', off: { number: 15, weight: 'harm' } } })
    expect(line.get('svg').attributes('aria-label')).toMatch(/^Life of LID-03\.Z since .* the unit changed on .* Today’s v15 is off its known-good\.$/)
    expect(line.findAll('rect.off-harm')).toHaveLength(1)
  })
})

describe('a refused signature', () => {
  it('names the place in words and the next step', async () => {
    const problem = new ApiProblem({ type: 'about:blank', title: 'Another person must do this', status: 403, code: 'four-eyes', detail: 'You brought in a harm value.', errors: [{ at: '/setup/thrustLimit', code: 'four-eyes', message: 'Thrust limit 38 → 55 % was brought in by Runa Haldersen in version 15.' }] })
    const shown = await mountSuspended(AxisSignProblem, { props: { problem } })
    expect(words(shown.text())).toBe('Another person must do this. You brought in a harm value.Thrust limit 38 → 55 % was brought in by Runa Haldersen in version 15.Ask another planner to look at these values and mark the version. Nothing was signed.')
  })
})
