import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it, vi } from 'vitest'
import { BoardAxisTable, BoardFind, BoardNeeds, BoardPlantMachines } from '#components'
import type { Attention, BoardAxis } from '#shared/api/board'
import { needOf } from '~/utils/board/attention'
import { countFilters, findAxes, searchable } from '~/utils/board/filter'
import { linesOf, machinesOf, splitName, strokeFor } from '~/utils/board/plant'
import { waitsFor } from '~/utils/board/waits'

let next = 1
function axis(tag: string, more: Partial<BoardAxis> = {}): BoardAxis {
  return {
    id: next++, tag, role: 'press', site: 'North hall', line: 'Line 1', machine: tag.split('.')[0] ?? tag, machineId: Number(/\d+/.exec(tag)?.[0] ?? 1), timeZone: 'Europe/Berlin',
    serial: `HL25-24-${String(next).padStart(5, '0')}`, model: 'HL25-150', status: 'in-line', off: { harm: 0, motion: 0, text: 0 }, sense: null,
    lastUploadAt: '2026-12-01T03:10:00.000Z', overdueSince: null, knownGood: { versionId: 9, number: 9, at: '2026-04-06T06:00:00.000Z' }, current: { versionId: 10, number: 10 },
    checks: { stop: 0, warn: 0, note: 0, unknown: 0 }, lacks: [], swap: null, ...more,
  }
}

const plant = [
  axis('LID-02.Z', { status: 'off', off: { harm: 6, motion: 2, text: 0 }, sense: 'more', checks: { stop: 1, warn: 0, note: 0, unknown: 0 } }),
  axis('LID-02.X', { role: 'index' }),
  axis('LID-10.Z', { status: 'unmarked', knownGood: null, current: { versionId: 20, number: 2 } }),
  axis('JAR-01.T', { status: 'never-read', knownGood: null, current: null, lastUploadAt: null, overdueSince: '2026-11-19T00:00:00.000Z', serial: 'HR40-25-00768', model: 'HR40' }),
  axis('CAS-01.P', { overdueSince: '2026-11-23T00:00:00.000Z', line: 'Line 2' }),
]
const tags = (axes: readonly BoardAxis[]) => axes.map(one => one.tag)

describe('finding an axis', () => {
  const rows = searchable(plant)

  it('takes every word, in any column, in any order and case', () => {
    expect(tags(findAxes(rows, 'hr40', 'all'))).toEqual(['JAR-01.T'])
    expect(tags(findAxes(rows, 'INDEX lid-02', 'all'))).toEqual(['LID-02.X'])
    expect(tags(findAxes(rows, '  press  lid-1 ', 'all'))).toEqual(['LID-10.Z'])
    expect(tags(findAxes(rows, 'no known-good', 'all'))).toEqual(['LID-10.Z'])
    expect(findAxes(rows, 'lid index worm', 'all')).toEqual([])
  })

  it('takes words in quotes as one whole cell: line 2 is not line 20', () => {
    const lines = searchable([axis('A.1', { line: 'Line 2' }), axis('A.2', { line: 'Line 20' }), axis('A.3', { line: 'Line 2', site: 'Cold hall' })])
    expect(tags(findAxes(lines, '"line 2"', 'all'))).toEqual(['A.1', 'A.3'])
    expect(tags(findAxes(lines, '"North hall" "Line 2"', 'all'))).toEqual(['A.1'])
    expect(tags(findAxes(lines, '"line 2', 'all'))).toEqual(['A.1', 'A.2', 'A.3'])
  })

  it('counts what each filter would leave', () => {
    expect(countFilters(plant)).toEqual({ 'all': 5, 'in-line': 2, 'off': 1, 'unmarked': 1, 'never-read': 1, 'overdue': 2, 'stop': 1, 'not-ready': 0 })
    expect(tags(findAxes(rows, '', 'overdue'))).toEqual(['JAR-01.T', 'CAS-01.P'])
    expect(tags(findAxes(rows, 'jar', 'overdue'))).toEqual(['JAR-01.T'])
    expect(tags(findAxes(rows, '', 'stop'))).toEqual(['LID-02.Z'])
  })

  it('offers the filters as buttons that say whether they hold', async () => {
    const find = await mountSuspended(BoardFind, { props: { text: '', filter: 'all', counts: countFilters(plant) } })
    const buttons = find.findAll('button')
    expect(buttons.map(button => button.text())).toEqual(['all 5', 'in line 2', 'off 1', 'no known-good 1', 'no upload 1', 'overdue 2', 'with a stop 1', 'not restorable 0'])
    expect(buttons.map(button => button.attributes('aria-pressed'))).toEqual(['true', ...Array.from({ length: 7 }, () => 'false')])
    await buttons[2]?.trigger('click')
    expect(find.emitted('update:filter')).toEqual([['off']])
  })
})

describe('the table', () => {
  const mount = () => mountSuspended(BoardAxisTable, { props: { axes: plant, none: 'No axis has these words.' } })
  const order = (table: Awaited<ReturnType<typeof mount>>) => table.findAll('tbody .tag').map(tag => tag.text())

  it('stands by tag at first, 2 before 10, and says so', async () => {
    const table = await mount()
    expect(order(table)).toEqual(['CAS-01.P', 'JAR-01.T', 'LID-02.X', 'LID-02.Z', 'LID-10.Z'])
    expect(table.findAll('[aria-sort]').map(head => [head.text(), head.attributes('aria-sort')])).toEqual([['Tag', 'ascending']])
  })

  it('sorts by what is pressed, worst first where there is a worst, and back', async () => {
    const table = await mount()
    const head = (word: string) => table.findAll('th button').find(button => button.text() === word)
    await head('Against known-good')?.trigger('click')
    expect(order(table)).toEqual(['JAR-01.T', 'LID-10.Z', 'LID-02.Z', 'LID-02.X', 'CAS-01.P'])
    expect(table.get('[aria-sort]').attributes('aria-sort')).toBe('descending')
    await head('Against known-good')?.trigger('click')
    expect(order(table).at(-1)).toBe('JAR-01.T')
    await head('Last upload')?.trigger('click')
    expect(order(table).at(-1)).toBe('JAR-01.T')
  })

  it('counts its rows for readers, the head among them', async () => {
    const table = await mount()
    expect(table.attributes('aria-rowcount')).toBe('6')
    expect(table.findAll('tbody tr').map(row => row.attributes('aria-rowindex'))).toEqual(['2', '3', '4', '5', '6'])
  })

  it('says one sentence where nothing is found', async () => {
    const table = await mountSuspended(BoardAxisTable, { props: { axes: [], none: 'No axis has these words.' } })
    expect(table.get('tbody').text()).toBe('No axis has these words.')
  })

  it('draws only what is in sight of 10,000 rows', async () => {
    const many = Array.from({ length: 10_000 }, (_, index) => axis(`LID-${index}.Z`))
    const table = await mountSuspended(BoardAxisTable, { props: { axes: many, none: '' } })
    expect(table.attributes('aria-rowcount')).toBe('10001')
    expect(table.findAll('tbody tr').length).toBeLessThan(200)
  })

  it('leaves those that were found, in the order in which all of them stand', async () => {
    const table = await mountSuspended(BoardAxisTable, { props: { axes: plant, found: new Set([...plant.slice(0, 2), ...plant.slice(3, 4)]), none: '' } })
    expect(order(table)).toEqual(['JAR-01.T', 'LID-02.X', 'LID-02.Z'])
    expect(table.attributes('aria-rowcount')).toBe('4')
    await table.setProps({ found: new Set(plant.slice(4)) })
    expect(order(table)).toEqual(['CAS-01.P'])
  })

  it('follows a link of a row within the application, and leaves one that is to open elsewhere to the browser', async () => {
    const table = await mount()
    const link = table.findAll('tbody .tag')[2]?.element
    expect(link?.getAttribute('href')).toBe('/axes/LID-02.X')
    const pressed = (more: MouseEventInit) => {
      const event = new MouseEvent('click', { bubbles: true, cancelable: true, ...more })
      link?.dispatchEvent(event)
      return event.defaultPrevented
    }
    const push = vi.spyOn(useRouter(), 'push').mockResolvedValue(undefined)
    expect([pressed({ ctrlKey: true }), pressed({ shiftKey: true }), pressed({ button: 1 })]).toEqual([false, false, false])
    expect(push).not.toHaveBeenCalled()
    expect(pressed({})).toBe(true)
    expect(push).toHaveBeenCalledExactlyOnceWith('/axes/LID-02.X')
    push.mockRestore()
  })

  it('names the one next thing each axis waits for', () => {
    expect(plant.map(one => waitsFor(one)?.words)).toEqual(['judgement', undefined, 'review of v2', 'first upload', 'upload'])
    expect(waitsFor(axis('A.1', { serial: null }))?.words).toBe('a unit')
    expect(waitsFor(axis('A.1', { status: 'off', off: { harm: 0, motion: 1, text: 0 } }))).toEqual({ words: 'comparison', to: '/changes?a=9&b=10' })
  })

  it('puts an open swap before all else, and tells since when it runs without release', async () => {
    const swap = { id: 12, step: 'read-back' as const, openedAt: '2026-11-30T20:10:00.000Z', openedBy: 'Tobias Achterberg', runningSince: null, releaseDueAt: '2026-12-01T20:10:00.000Z', overdue: false }
    const open = axis('A.1', { serial: null, swap })
    const runs = axis('A.2', { swap: { ...swap, id: 13, step: 'release', runningSince: '2026-11-30T22:40:00.000Z', overdue: true } })
    expect([open, runs].map(waitsFor)).toEqual([{ words: 'swap, go on', to: '/swaps/12' }, { words: 'swap, release', to: '/swaps/13' }])
    const table = await mountSuspended(BoardAxisTable, { props: { axes: [open, runs], none: '' } })
    expect(table.findAll('.c-waits a').map(link => [link.attributes('href'), link.attributes('title')?.replace(' 2026', ''), link.text().replace(' 2026', '')])).toEqual([
      ['/swaps/12', 'Swap open since 30 Nov 21:10, not ended', 'swap, go on of A.1: Swap open since 30 Nov 21:10, not ended'],
      ['/swaps/13', 'Swap running since 30 Nov 23:40, not released, late', 'swap, release of A.2: Swap running since 30 Nov 23:40, not released, late'],
    ])
    expect(tags(findAxes(searchable([...plant, open, runs]), 'not released', 'all'))).toEqual(['A.2'])
    expect(tags(findAxes(searchable([...plant, open, runs]), 'swap', 'all'))).toEqual(['A.1', 'A.2'])
  })
})

describe('the plant in strokes', () => {
  it('draws an axis to 60, a machine to 2,500, a line beyond', () => {
    expect([1, 60, 61, 2500, 2501].map(strokeFor)).toEqual(['axis', 'axis', 'machine', 'machine', 'line'])
  })

  it('draws a machine as its worst axis: harm, no upload, no known-good, motion, text', () => {
    const off = (weight: 'harm' | 'motion' | 'text') => axis('LID-01.Z', { status: 'off', off: { harm: 0, motion: 0, text: 0, [weight]: 1 } })
    const kinds = [off('text'), off('motion'), axis('LID-01.Z', { status: 'unmarked' }), axis('LID-01.Z', { status: 'never-read' }), off('harm')]
    const worst = kinds.map((_, index) => machinesOf([axis('LID-01.X'), ...kinds.slice(0, index + 1)])[0]?.words)
    expect(worst).toEqual(['1 of 2 off by text', '1 of 3 off by motion', '1 of 4 no known-good', '1 of 5 no upload', '1 of 6 off by harm'])
    expect(machinesOf([axis('LID-01.X')])[0]?.words).toBe('in line')
  })

  it('names groups of machines by stem and span', () => {
    expect([splitName('LID-03'), splitName('Palletiser')]).toEqual([{ stem: 'LID', number: '03' }, { stem: 'Palletiser', number: '' }])
    const [line, other] = linesOf([axis('LID-01.Z'), axis('LID-02.Z'), axis('CAS-03.P'), axis('JAR-04.T', { line: 'Line 2' })])
    expect(line?.groups.map(group => group.name)).toEqual(['LID 01–02', 'CAS 03'])
    expect([line?.axes, other?.line]).toEqual([3, 'Line 2'])
  })

  it('opens one machine at a time, in its place', async () => {
    const machines = await mountSuspended(BoardPlantMachines, { props: { axes: plant } })
    const stroke = (name: string) => machines.findAll('button').find(button => button.attributes('aria-label')?.startsWith(name))
    expect(stroke('LID-02')?.attributes('aria-label')).toBe('LID-02: 1 of 2 off by harm')
    await stroke('LID-02')?.trigger('click')
    expect(machines.findAll('.open a').map(link => link.text())).toEqual(['LID-02', 'Z', 'X'])
    await stroke('LID-10')?.trigger('click')
    expect(machines.findAll('.open a').map(link => link.text())).toEqual(['LID-10', 'Z'])
    await stroke('LID-10')?.trigger('click')
    expect(machines.find('.open').exists()).toBe(false)
  })
})

describe('what needs someone now', () => {
  const item = (tag: string, text = '') => ({ axisId: 1, tag, versionId: 12, knownGoodId: 11, findingId: null, text, since: null })
  const off: Attention = { kind: 'off-known-good', count: 6, since: '2026-11-25T00:00:00.000Z', items: [item('LID-03.Z', 'by 6 harm values'), item('CAS-01.X'), item('LID-02.Z')] }

  it('counts first, names the worst, then the others and how many more', () => {
    expect(needOf(off)).toMatchObject({ words: 'axes off known-good', action: 'Compare', to: '/changes?a=11&b=12', first: { tag: 'LID-03.Z', to: '/axes/LID-03.Z', text: 'by 6 harm values; CAS-01.X, LID-02.Z and 3 more' } })
    expect(needOf({ ...off, count: 1, items: [item('LID-03.Z', 'by 6 harm values')] })).toMatchObject({ words: 'axis off known-good', first: { text: 'by 6 harm values' } })
    expect(needOf({ ...off, kind: 'tray', count: 2, items: [{ ...item('HL25-24-01190', 'is not registered'), axisId: null }] })).toMatchObject({ to: '/tray', first: { to: undefined, text: 'is not registered; 1 more' } })
  })

  it('leaves out what counts nothing, and says so when nothing waits', async () => {
    const needs = await mountSuspended(BoardNeeds, { props: { attention: [off, { ...off, kind: 'tray', count: 0, items: [] }] } })
    expect(needs.findAll('tr')).toHaveLength(1)
    const none = await mountSuspended(BoardNeeds, { props: { attention: [] } })
    expect(none.text()).toContain('Nothing waits')
  })
})
