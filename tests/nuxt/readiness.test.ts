import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { AxisReadiness, BoardPlantAxes, BoardWhyNot, LabelsLabel } from '#components'
import type { BoardAxis } from '#shared/api/board'
import { lacks } from '#shared/api/readiness'
import { findAxes, searchable } from '~/utils/board/filter'
import { firstUnready, lackWords, whyNot } from '~/utils/words/readiness'
import { axis as oneAxis } from '../support/axis-answers'

let next = 1
const axis = (tag: string, more: Partial<BoardAxis> = {}): BoardAxis => ({
  id: next++, tag, role: 'press', site: 'North hall', line: 'Line 1', machine: 'LID-02', machineId: 2, timeZone: 'Europe/Berlin', serial: 'HL25-24-00001', model: 'HL25-150', status: 'in-line',
  off: { harm: 0, motion: 0, text: 0 }, sense: null, lastUploadAt: '2026-12-01T03:10:00.000Z', overdueSince: null, knownGood: { versionId: 9, number: 9, at: '2026-04-06T06:00:00.000Z' }, current: { versionId: 10, number: 10 },
  checks: { stop: 0, warn: 0, note: 0, unknown: 0 }, lacks: [], swap: null, ...more,
})
const plant = [
  axis('LID-02.Z'), axis('CAS-01.P', { lacks: ['overdue', 'no-spare'] }), axis('JAR-01.T', { lacks: ['no-known-good'], knownGood: null, current: null }), axis('LID-02.X', { lacks: ['no-label'] }),
]

describe('why an axis could not be restored', () => {
  it('is said with what to do, for each reason there is', () => {
    const told = whyNot({ tag: 'LID-02.Z', model: 'HL40-200V', current: { number: 3 }, knownGood: { number: 2 } }, lacks)
    expect(told.map(({ lack }) => lack)).toEqual([...lacks])
    expect(told.map(({ to }) => to)).toEqual(['/axes/LID-02.Z/versions/3', '/axes/LID-02.Z/versions/3', '/upload', '/units', '/axes/LID-02.Z/versions/2', '/axes/LID-02.Z/label'])
    for (const { words, action } of told) expect(`${words} ${action}`).toMatch(/^[A-Z].*\. [A-Z]/)
  })

  it('begins with an upload where nothing was ever read', () => {
    expect(whyNot({ tag: 'JAR-01.T', model: null, current: null, knownGood: null }, ['no-known-good', 'no-spare']).map(({ words, to }) => [words, to])).toEqual([
      ['Nothing was ever uploaded from this drive.', '/upload'], ['No unit is fitted, so that nobody knows which spare would fit.', '/units'],
    ])
  })

  it('puts those without a known-good first', () => expect(firstUnready(plant).map(({ tag }) => tag)).toEqual(['JAR-01.T', 'CAS-01.P', 'LID-02.X']))

  it('names four of thousands in one pass', () => {
    const many = Array.from({ length: 20 }, (_, index) => axis(`A-${20 - index}`, { lacks: index % 2 === 0 ? ['no-spare'] : ['no-spare', 'no-label'] }))
    expect(firstUnready(many).map(({ tag }) => tag)).toEqual(['A-1', 'A-3', 'A-5', 'A-7'])
  })

  it('can be searched by its reason and filtered', () => {
    const rows = searchable(plant)
    expect(findAxes(rows, `"${lackWords['no-spare']}"`, 'all').map(({ tag }) => tag)).toEqual(['CAS-01.P'])
    expect(findAxes(rows, '', 'not-ready')).toHaveLength(3)
  })
})

describe('the head of the board', () => {
  it('names the first, counts each reason, and finds by it', async () => {
    const page = await mountSuspended(BoardWhyNot, { props: { axes: plant } })
    expect(page.findAll('.axes > li').map(item => item.find('.tag').text())).toEqual(['JAR-01.T', 'CAS-01.P', 'LID-02.X'])
    expect(page.findAll('.reasons button').map(button => button.text())).toEqual(['1 no known-good', '1 upload overdue', '1 no spare fits', '1 no label printed'])
    await page.findAll('.reasons button')[2]?.trigger('click')
    expect(page.emitted('find')).toEqual([['"no spare fits"']])
  })

  it('says so where every axis is ready', async () => {
    const page = await mountSuspended(BoardWhyNot, { props: { axes: [axis('LID-02.Z')] } })
    expect(page.text()).toContain('Every axis has a known-good, a spare that fits')
    expect(page.find('ol').exists()).toBe(false)
  })

  it('ties strokes to reasons by a ring, in words too', async () => {
    const page = await mountSuspended(BoardPlantAxes, { props: { axes: plant } })
    expect(page.findAll('.balloon').map(ring => ring.text())).toEqual(['2', '1', '3'])
    expect(page.find('[aria-label*="JAR-01.T"]').attributes('aria-label')).toContain('could not be restored tonight')
  })
})

describe('the page of an axis', () => {
  it('says why not, and that it is ready where it is', async () => {
    const not = await mountSuspended(AxisReadiness, { props: { axis: oneAxis } })
    expect(not.findAll('li').map(item => item.text())).toEqual(['No spare in stock fits HL40-200V. See the units.', 'No label with this tag was printed. Print the label.'])
    const ready = await mountSuspended(AxisReadiness, { props: { axis: { ...oneAxis, readiness: { ready: true, lacks: [] } } } })
    expect(ready.text()).toContain('could be restored tonight')
  })
})

describe('a label', () => {
  const label = { axisId: 1, tag: 'LID-02.Z', role: 'seat lid', machine: 'LID-02', line: 'Line 1', falls: true, address: 'https://marks.example/axes/LID-02.Z', printed: null }

  it('has tag, place, warning and code, and no value', async () => {
    const large = await mountSuspended(LabelsLabel, { props: { label, size: '100x50' } })
    expect(large.text().replaceAll(/\s+/g, ' ')).toBe('LID-02.Zseat lidLID-02, Line 1 load can fall: block it Scan before you take it apart.')
    expect(large.find('svg[role="img"]').attributes('aria-label')).toBe('QR code to https://marks.example/axes/LID-02.Z')
    expect(large.findAll('.qr rect').length).toBeGreaterThan(100)
  })

  it('sets a long tag smaller', async () => {
    const long = await mountSuspended(LabelsLabel, { props: { label: { ...label, tag: 'A-VERY-LONG-TAG-OF-32-CHARACTERS' }, size: '50x25' } })
    expect(long.classes()).toContain('k8')
    expect((await mountSuspended(LabelsLabel, { props: { label, size: '50x25' } })).classes()).toContain('k0')
  })
})
