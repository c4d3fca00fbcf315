import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readSettings } from '../../../shared/settings/read'
import { line } from '../../../server/database/schema'
import type { PersonActor } from '../../../server/database/actor'
import { attach } from '../../../server/services/attachments/attach'
import { indexPage } from '../../../server/services/line-folder/index-page'
import { folderFile, foldersIn, keepFolder, listFolders } from '../../../server/services/line-folder/kept-folders'
import { isDue, makeDueFolders } from '../../../server/services/line-folder/nightly'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { pdfText, unzipped } from '../../support/paper'
import { day, hour, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

let plant: Plant
let tobias: PersonActor
let lineId: number
const own = Buffer.from('what the drive tool saved')

beforeEach(() => {
  plant = openPlant()
  tobias = plant.person('Tobias Achterberg', ['technician'])
  for (const [index, tag] of ['LID-02.Z', 'LID-02.C'].entries()) plant.fit(plant.axis(tag), plant.unit(`SN-000${index + 1}`), start - 300 * day)
  plant.axis('LID-02.<b>'.replace(/[<>]/g, '_'))
  lineId = plant.vault.db.select().from(line).all()[0]?.id ?? 0
  store('SN-0001')
})
afterEach(() => plant.close())

function store(serial: string): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile({ serial, setup: { thrustLimit: 38 } }), name: null }, {})
  return outcome.outcome === 'version' ? outcome.answer.version.id : 0
}
async function taken(kept = false): Promise<Map<string, Buffer>> {
  const { chunks, size } = await folderFile(plant.vault, lineId, kept, 'https://marks.example')
  const parts: Buffer[] = []
  for await (const part of chunks) parts.push(part)
  const bytes = Buffer.concat(parts)
  expect(bytes.length).toBe(size)
  return unzipped(bytes)
}

describe('a line folder', () => {
  it('has every axis with its sheet, its files, its backup, and a page that opens by itself', async () => {
    const path = join(plant.vault.folder, 'come')
    writeFileSync(path, own)
    attach(plant.vault, tobias, store('SN-0002'), { path, size: own.length, sha256: createHash('sha256').update(own).digest('hex'), name: 'c.drv', mediaType: '' }, {})
    const files = await taken()
    expect([...files.keys()].sort()).toEqual([
      'LID-02.C/0-own-backup-of-SN-0002/1-c.drv', 'LID-02.C/2-LID-02.C-v1-kit.json', 'LID-02.C/3-LID-02.C-v1-kit.csv', 'LID-02.C/sheet.pdf',
      'LID-02.Z/2-LID-02.Z-v1-kit.json', 'LID-02.Z/3-LID-02.Z-v1-kit.csv', 'LID-02.Z/sheet.pdf', 'index.html',
    ])
    expect(files.get('LID-02.C/0-own-backup-of-SN-0002/1-c.drv')?.equals(own)).toBe(true)
    const page = files.get('index.html')?.toString('utf8') ?? ''
    for (const [, address = ''] of page.matchAll(/href="([^"]+)"/g)) expect(files.has(decodeURIComponent(address)), address).toBe(true)
    expect(page.match(/<tr>/g)).toHaveLength(4)
    expect(page).toContain('This axis was never read: there is nothing to restore.')
    expect(page).not.toMatch(/<script|https?:|src=/)
  })

  it('leaves the serial of the sheet blank, and shows its code on the page', async () => {
    const files = await taken()
    const sheet = pdfText(files.get('LID-02.Z/sheet.pdf') ?? Buffer.alloc(0)).replaceAll(/\s+/g, ' ')
    const code = /read-back must show ([0-9A-Z]{5}-[0-9A-Z]{5})/.exec(sheet)?.[1] ?? 'none'
    expect(files.get('index.html')?.toString('utf8')).toContain(`<td class="m">${code}</td>`)
    expect(sheet).toContain('Unit in Its model')
    expect(sheet).not.toContain('TO-BE-WRITTEN')
    // The serial is to be written before the file can go in: nothing else is wrong with it.
    expect(readSettings(files.get('LID-02.Z/3-LID-02.Z-v1-kit.csv') ?? Buffer.alloc(0))).toMatchObject({ ok: false, errors: [{ at: '/unit/serial', code: 'missing' }], more: 0 })
  })

  it('that is made on demand leaves nothing behind', async () => {
    await taken()
    expect(readdirSync(plant.vault.folder).filter(name => name.includes('part'))).toEqual([])
    expect(existsSync(foldersIn(plant.vault))).toBe(false)
  })

  it('writes what people called things, never as a tag of the page', () => {
    const page = indexPage({ plant: '<em>"P"&', site: '', line: '<script>', timeZone: 'UTC', madeAt: '2026-12-01T06:00:00.000Z', axes: [{ tag: 'A', role: '<i>', machine: '', unit: '', knownGood: '', code: '', note: '\'', files: [{ path: 'A/ä b', words: '<u>' }] }] })
    expect(page).not.toMatch(/<(script|em|i|u)>/)
    expect(page).toContain('href="A/%C3%A4%20b"')
  })
})

describe('the folder of each night', () => {
  const silent = { info: () => undefined, error: () => undefined }
  const kept = () => listFolders(plant.vault, tobias).items[0]

  it('is kept, told with its age and size, and handed out as it is', async () => {
    expect(kept()).toMatchObject({ lineId, line: 'Jars', axes: 3, kept: null, failed: null })
    await expect(taken(true)).rejects.toMatchObject({ code: 'not-found' })
    await keepFolder(plant.vault, lineId, '')
    expect(kept()?.kept).toMatchObject({ madeAt: new Date(plant.now).toISOString(), axes: 3 })
    const before = await taken(true)
    store('SN-0002')
    expect([...(await taken(true)).keys()]).toEqual([...before.keys()])
    expect([...(await taken(false)).keys()].length).toBeGreaterThan(before.size)
  })

  it('stays the one before where a new one fails, and says why', async () => {
    await keepFolder(plant.vault, lineId, '')
    const path = join(foldersIn(plant.vault), `line-${lineId}.zip`)
    const before = readFileSync(path)
    const { madeAt } = kept()?.kept ?? { madeAt: '' }
    plant.now += hour
    plant.vault.sqlite.exec('DROP TRIGGER content_no_update; UPDATE content SET text = x\'00\'')
    await keepFolder(plant.vault, lineId, '')
    expect(readFileSync(path).equals(before)).toBe(true)
    expect(kept()).toMatchObject({ kept: { madeAt }, failed: { at: new Date(plant.now).toISOString() } })
    expect(readdirSync(foldersIn(plant.vault)).filter(name => name.endsWith('.part'))).toEqual([])
  })

  // The site's clock: Berlin, one hour before UTC in winter.
  it.each([
    [null, '2026-12-01T12:00:00.000Z', true],
    ['2026-12-01T01:30:00.000Z', '2026-12-01T23:00:00.000Z', false],
    ['2026-12-01T01:30:00.000Z', '2026-12-02T00:59:00.000Z', false],
    ['2026-12-01T01:30:00.000Z', '2026-12-02T01:00:00.000Z', true],
    ['2026-11-20T01:30:00.000Z', '2026-12-01T14:00:00.000Z', true],
    ['2026-12-01T00:30:00.000Z', '2026-12-01T01:10:00.000Z', true],
  ])('last made %s, now %s: due %s', (last, now, due) => expect(isDue(last, now, 'Europe/Berlin')).toBe(due))

  it('is made once a night, not for a line without axes', async () => {
    plant.machineAt('Ostfield')
    expect(await makeDueFolders(plant.vault, '', silent)).toBe(1)
    expect(await makeDueFolders(plant.vault, '', silent)).toBe(0)
    plant.now += day
    expect(await makeDueFolders(plant.vault, '', silent)).toBe(1)
  })
})
