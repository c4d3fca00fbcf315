import Papa from 'papaparse'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { HistoryItem, HistoryQuery } from '../../../../shared/api/history'
import { unguard } from '../../../../shared/settings/spreadsheet-guard'
import type { PersonActor } from '../../../../server/database/actor'
import { historyFile } from '../../../../server/services/history/file'
import { listHistory } from '../../../../server/services/history/history'
import { checkpointNow } from '../../../../server/services/trail/trail'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { pageSizes, pdfText } from '../../../support/paper'
import { day, iso, minute, openPlant, settingsFile, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
let ines: PersonActor
let tobias: PersonActor

beforeEach(() => {
  plant = openPlant()
  ines = plant.person('Ines Morel', ['auditor'])
  tobias = plant.person('Tobias Achterberg', ['technician'])
  plant.fit(plant.axis('LID-02.Z'), plant.unit('SN-0001'), start - 300 * day)
})
afterEach(() => plant.close())

function change(times: number, words = {}): void {
  for (let step = 0; step < times; step += 1) {
    plant.now += minute
    storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup: { thrustLimit: 30 + step % 40, jogSpeed: 10 + step }, exportedAt: iso(plant.now) }), name: 'lid.json' }, words)
  }
}

async function bytesOf(query: Partial<HistoryQuery>, form: 'csv' | 'pdf', as = ines): Promise<Buffer> {
  const chunks: Buffer[] = []
  for await (const chunk of historyFile(plant.vault, as, query, form).chunks) chunks.push(chunk)
  return Buffer.concat(chunks)
}
function whole(query: Partial<HistoryQuery>): HistoryItem[] {
  const items: HistoryItem[] = []
  for (let cursor: string | undefined; ;) {
    const page = listHistory(plant.vault, ines, { ...query, limit: 200, ...(cursor !== undefined && { cursor }) })
    items.push(...page.items)
    if (page.next === null) return items
    cursor = page.next
  }
}

describe('the history as CSV', () => {
  it('holds every line that the list has, more than one page of them, and parses back', async () => {
    change(260)
    const text = (await bytesOf({ field: 'limits' }, 'csv')).toString('utf8')
    expect(text.charCodeAt(0)).toBe(0xFEFF)
    const [lines = '', foot = ''] = text.slice(1).split('\r\n\r\n')
    const { data, errors } = Papa.parse<Record<string, string>>(lines, { header: true })
    expect(errors).toEqual([])
    const items = whole({ field: 'limits' })
    expect(items).toHaveLength(259)
    expect(data.map(row => [row.axis, row.field, Number(row.before), Number(row.after), row['received at'], Number(row.version)]))
      .toEqual(items.map(item => [item.tag, item.field, item.before, item.after, item.at, item.number]))
    const told = new Map(Papa.parse<[string, string]>(foot.trimEnd()).data)
    expect(told.get('# lines')).toBe('259')
    expect(told.get('# question')).toMatch(/^Who changed any limit on every axis since the first version until now\?$/)
    expect(told.get('# checkpoint of the log')).toBe(checkpointNow(plant.vault).note)
    expect(told.get('# zone of the question')).toBe('Europe/Berlin')
    expect(told.get('# rests on')).toMatch(/^Rests on 260 versions; every axis was read in that time; the log was not verified yet; the log has \d+ entries\.$/)
  })

  it('writes no cell that a spreadsheet takes for a formula, and loses nothing by it', async () => {
    const reason = '=HYPERLINK("http://x","y")'
    change(2, { reason, changedBy: '@night', workOrder: '+1 "quoted"\r\nline' })
    const { data } = Papa.parse<Record<string, string>>((await bytesOf({ field: 'thrustLimit' }, 'csv')).toString('utf8').slice(1).split('\r\n\r\n')[0]!, { header: true })
    expect(data).toHaveLength(1)
    const [row] = data
    for (const cell of Object.values(row!)) expect(cell).not.toMatch(/^[=@+\t]/)
    expect([row!.reason, row!['changed by'], row!['work order']].map(cell => unguard(cell!))).toEqual([reason, '@night', '+1 "quoted"\r\nline'])
  })

  it('of nothing has its head and its foot', async () => {
    const text = (await bytesOf({ field: 'thrustLimit' }, 'csv')).toString('utf8')
    expect(text).toContain('# lines,0')
  })
})

describe('the history as PDF', () => {
  it('holds every line on as many pages as it says, with question, zone and checkpoint', async () => {
    change(140, { reason: 'lids stood proud', allowedBy: 'Marit Lund' })
    const pdf = await bytesOf({ axis: 'tag:LID-02.Z', from: iso(start) }, 'pdf')
    const items = whole({ axis: 'tag:LID-02.Z', from: iso(start) })
    const pages = pdfText(pdf).split('\f').slice(0, -1)
    expect(pages.length).toBeGreaterThan(5)
    expect(pageSizes(pdf)).toEqual(pages.map(() => [841.89, 595.28]))
    for (const [index, page] of pages.entries()) expect(page).toContain(`page ${index + 1} of ${pages.length}`)
    expect(pages[0]).toMatch(/Who changed anything on LID-02\.Z from Sun 1 Mar 2026 07:00:00 CET \(UTC\+1\) until now\?/)
    expect(pages[0]).toContain(`${items.length} changes, newest first`)
    expect(pages[0]).toContain('Rests on 140 versions; every axis was read in that time')
    expect(pages[0]!.replaceAll(/\s+/g, '')).toContain(checkpointNow(plant.vault).note.trim().split('\n').filter(Boolean).join('|').replaceAll(/\s+/g, ''))
    const text = pages.join('\n')
    expect(text.match(/LID-02\.Z/g)!.length).toBeGreaterThanOrEqual(items.length)
    for (const { number } of items) expect(text).toMatch(new RegExp(`v${number}\\b`))
    expect(text.match(/thrust limit/g)).toHaveLength(139)
    expect(text.match(/jog speed/g)).toHaveLength(139)
    expect(text).toContain('Marit Lund')
    expect(text).toContain('Nobody')
  }, 30_000)

  it('of nothing is one page that says so', async () => {
    const text = pdfText(await bytesOf({ field: 'thrustLimit', axis: 'tag:LID-02.Z' }, 'pdf'))
    expect(text).toContain('0 changes')
    expect(text).toContain('page 1 of 1')
  })
})

it('files are made for planners, auditors and scripts that may read, not for technicians', () => {
  expect(() => historyFile(plant.vault, tobias, {}, 'csv')).toThrow(expect.objectContaining({ code: 'role' }))
  expect(() => historyFile(plant.vault, plant.token('reports', ines), {}, 'csv')).not.toThrow()
})
