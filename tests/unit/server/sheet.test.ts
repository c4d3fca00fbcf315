import { writeFileSync } from 'node:fs'
import { createHash } from 'node:crypto'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { cautions } from '../../../shared/settings/cautions'
import { hashesOf } from '../../../shared/settings/hash'
import { layoutRail } from '../../../shared/pictures/rail'
import { railInputOf, railSideOf } from '../../../shared/pictures/rail-input'
import { readSettings } from '../../../shared/settings/read'
import { formatNumber } from '../../../shared/units/number'
import type { PersonActor } from '../../../server/database/actor'
import { attach } from '../../../server/services/attachments/attach'
import { kitParts } from '../../../server/services/kit/kit-parts'
import { makeKit } from '../../../server/services/kit/make-kit'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { sha256 } from '../../../server/database/sha256'
import { millimetres } from '../../../server/services/paper/paper'
import { railPixels } from '../../../server/services/sheet/draw-rail'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { liftFile, liftPlate } from '../../support/entry-table'
import { pageSizes, pdfText, pdfWords, qrOf, unzipped } from '../../support/paper'
import { day, minute, openLidPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

beforeEach(() => {
  ({ plant, runa, tobias, axisId } = openLidPlant({ unit: { firmware: '2.4' } }))
})
afterEach(() => plant.close())

const setup = { thrustLimit: 38, homingMethod: 'absolute-encoder', homeOffset: 12.5, homingCreepSpeed: 5, frictionForce: 25, softLimitMin: -2.5, softLimitMax: 184.25, selectInputs: 3, nodeAddress: 7 }
const moves = [
  { move: 0, label: 'Top, rest', kind: 'absolute', target: 5, speed: 250, acceleration: 2000 },
  { move: 3, label: 'Seat', comment: 'slow, the lid is thin', kind: 'press', target: 104.25, speed: 180, acceleration: 1500, forceLimit: 32, approach: 88, pressSpeed: 20, next: 5, dwell: 120 },
  { move: 5, kind: 'relative', target: -2, speed: 20, acceleration: 200 },
]

function store(parts: FileParts = { setup, moves, zones: [{ zone: 1, from: 0, to: 12 }], extra: { 'K-017': 15, 'Recipe': '007' } }): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile(parts), name: null }, {})
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const kit = async (form: 'pdf' | 'zip', more: { serial?: string, paper?: 'A4' | 'Letter' } = {}) =>
  (await makeKit(plant.vault, tobias, axisId, { form, cautionsRead: true, ...more }, 'https://marks.example')).kit.bytes
const words = (text: string) => text.replaceAll(/\s+/g, ' ')

describe('a restore sheet', () => {
  it('says whose it is, the code that the read-back must show, the mark, the cautions, and where the QR code leads', async () => {
    markKnownGood(plant.vault, runa, store(), { meaning: 'approved' })
    plant.vault.sqlite.exec('UPDATE axis SET flags = \'["gravity"]\'')
    plant.unit('SN-0002', { firmware: '2.4' })
    const pdf = await kit('pdf', { serial: 'SN-0002' })
    const text = words(pdfText(pdf))
    const { content } = kitParts(plant.vault.db, tobias, axisId, 'SN-0002', plant.vault.now()).fitted
    const { scribeCode } = hashesOf(content, sha256)
    for (const part of ['LID-02.Z', 'Flagged: gravity', `is ${scribeCode}`, 'SN-0002', 'SN-0001', 'v1, Runa Haldersen, Sun 1 Mar 2026', 'lid press, Lid press 1', 'Released (planner)', 'Home at creep speed, 5 mm/s']) expect(text, part).toContain(part)
    expect(text.match(new RegExp(scribeCode, 'g'))?.length).toBeGreaterThanOrEqual(3)
    for (const caution of cautions) for (const word of caution.split(' ')) expect(text).toContain(word)
    expect(text).not.toContain('Not released')
    expect(qrOf(pdf)).toBe('https://marks.example/axes/LID-02.Z')
  })

  it('has every value, and what is to be taught in an empty place of its own', async () => {
    store()
    plant.unit('SN-0002', { firmware: '2.4' })
    const text = words(pdfText(await kit('pdf', { serial: 'SN-0002' })))
    for (const part of ['Thrust limit 38 %', 'Soft limit, min −2.5 mm', 'Soft limit, max 184.25 mm', 'Method absolute-encoder', 'Friction 25 N prove', 'Node address 7', 'Zone 1, from 0 mm', 'Zone 1, to 12 mm', 'K-017 15', 'Recipe 007']) expect(text, part).toContain(part)
    expect(text).toContain('To be taught on this unit')
    expect(text).toContain('Home offset')
    expect(text).not.toContain('12.5')
    expect(text).toContain('Not released')
  })

  it('has every move with its inputs, its comment and the first motion', async () => {
    store()
    const text = words(pdfText(await kit('pdf')))
    for (const part of ['0 0 0 0 Top, rest absolute 5 250 2000', '3 0 1 1 Seat press 104.25 180 1500', 'slow, the lid is thin', '5 1 0 1 relative −2 20 200', '3 rows, none else', '3›5 runs by itself, 2 movements', 'First motion at 10 %']) expect(text, part).toContain(part)
  })

  it('draws the rail of the axis page: each move where its target stands, to scale, with the bounds in words', async () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
    store({ setup: { softLimitMin: -2.5, softLimitMax: 184.25, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 5 }, zones: [{ zone: 1, from: 0, to: 12 }], moves: [
      { move: 11, kind: 'absolute', target: 20, speed: 250, acceleration: 2000 }, { move: 12, kind: 'absolute', target: 80, speed: 250, acceleration: 2000 },
      { move: 13, kind: 'press', target: 150, approach: 120, speed: 180, acceleration: 1500, forceLimit: 32 }, { move: 14, kind: 'relative', target: -2, speed: 20, acceleration: 200 },
    ] })
    const pdf = await kit('pdf')
    const text = words(pdfText(pdf))
    for (const part of ['Hard stops at −5 and 195 mm. Soft limits min −2.5, max 184.25 mm. Zone 1 from 0 to 12 mm.', 'soft −2.5', 'soft 184.25', 'thick with hatching outside: hard stop; dashed: soft limit; hatched within the rule: zone', 'a press from its approach']) expect(text, part).toContain(part)
    const found = pdfWords(pdf, 1)
    const bounds = found.find(({ text: word }) => word === 'Hard')?.y ?? 0
    const title = found.find(({ text: word, y }) => word === 'Write' && y > bounds - 300 && y < bounds && found.some(other => other.text === 'moves:' && Math.abs(other.y - y) < 1))?.y ?? 0
    const rings = ['11', '12', '13'].map(move => found.filter(({ text: word, y }) => word === move && y > title && y < bounds).toSorted((a, b) => a.y - b.y)[0]?.x ?? NaN)
    const [first = NaN, second = NaN, third = NaN] = rings
    expect((third - first) / (second - first)).toBeCloseTo((150 - 20) / (80 - 20), 1)
    const rail = kitParts(plant.vault.db, tobias, axisId, undefined, plant.vault.now()).fitted.content
    const layout = layoutRail(railInputOf({ upper: rail }, { upper: railSideOf(rail, 'mm') }, { model: 'HL40-200V', axisKind: 'linear', stroke: 200 }), railPixels)
    const scale = (second - first) / ((layout.halves[0]?.balloons[1]?.x ?? 0) - (layout.halves[0]?.balloons[0]?.x ?? 0))
    expect(scale * railPixels).toBeCloseTo(595.28 - millimetres(26), -1)
  })

  it('has no rail where there is nothing to draw, and explains only what is drawn', async () => {
    store({ setup: { thrustLimit: 38 } })
    expect(words(pdfText(await kit('pdf')))).not.toContain('Hard stops')
    store({ setup: { softLimitMin: 0 } })
    expect(words(pdfText(await kit('pdf')))).toContain('Hard stops not known: they take the stroke of the model and homing against a stop. Soft limits min 0 mm. Drawn: dashed: soft limit.')
  })

  it('cuts no name, puts a unit behind a number of many places, and says at least in words', async () => {
    const name = 'Überlast-Schwelle der Schließkraft bei Übertemperatur am Motor'
    store({ setup: { jerk: 60_000, softLimitMin: 0, softLimitMax: 100 }, moves: [5, 62].map((target, move) => ({ move, kind: 'absolute', target, speed: 250, acceleration: 2000 })), extra: { [name]: { value: 393.19000000000005, unit: 'mm/s²' } } })
    const text = words(pdfText(await kit('pdf')))
    for (const word of name.split(' ')) expect(text).toContain(word)
    expect(text).toContain('393.19000000000005 mm/s²')
    expect(text).toMatch(/at least \d+\.\d/)
    expect(text).not.toMatch(/U\+[0-9A-F]{4}/)
  })

  it('counts its pages and repeats tag, code, log and time on each', async () => {
    store({ setup, moves: [], extra: Object.fromEntries(Array.from({ length: 300 }, (_, index) => [`K-${index}`, index])) })
    const pages = pdfText(await kit('pdf')).split('\f').slice(0, -1)
    expect(pages.length).toBeGreaterThan(2)
    pages.forEach((page, index) => {
      for (const part of [`page ${index + 1} of ${pages.length}`, 'LID-02.Z', 'log of', 'printed Sun 1 Mar 2026']) expect(words(page), part).toContain(part)
    })
  })

  it('is A4 or Letter, as the site says or as it is asked for', async () => {
    store()
    expect(pageSizes(await kit('pdf'))[0]?.map(Math.round)).toEqual([595, 842])
    expect(pageSizes(await kit('pdf', { paper: 'Letter' }))[0]?.map(Math.round)).toEqual([612, 792])
    plant.vault.sqlite.exec('UPDATE site SET paper = \'Letter\'')
    expect(pageSizes(await kit('pdf'))[0]?.map(Math.round)).toEqual([612, 792])
  })

  it('is refused where the cautions are unread or nothing was ever read', async () => {
    await expect(makeKit(plant.vault, tobias, axisId, { form: 'pdf', cautionsRead: false }, '')).rejects.toMatchObject({ code: 'cautions-unread' })
    await expect(kit('pdf')).rejects.toMatchObject({ code: 'no-known-good' })
  })

  it('with an entry table has the drive’s own numbers in the drive’s own order', async () => {
    plant.nameplate(liftPlate)
    const lift = plant.axis('LFT-01.Z')
    plant.fit(lift, plant.unit('LT10-26-0001', { model: 'LT10-100', firmware: '1.4' }), start - 300 * day)
    plant.now += minute
    expect(storeUpload(plant.vault, tobias, { bytes: Buffer.from(JSON.stringify({ ...liftFile, exportedAt: new Date(plant.now).toISOString() })), name: null }, {}).outcome).toBe('version')
    const { kit: { bytes } } = await makeKit(plant.vault, tobias, lift, { form: 'pdf', cautionsRead: true }, '')
    const text = words(pdfText(bytes))
    for (const part of ['in the order of the drive’s own list', 'K-001 Positive direction 1 retract', 'K-003 Soft limit, min −2,5 mm', 'K-012 Speed limit 0,250 m/s = 250 mm/s', 'P press 15025']) expect(text, part).toContain(part)
    expect(text.indexOf('K-003')).toBeLessThan(text.indexOf('K-012'))
    // Nobody said where people reach the vault: the code holds the tag.
    expect(qrOf(bytes)).toBe('LFT-01.Z')
  })

  it('of 2,000 rows prints complete', async () => {
    const many = Array.from({ length: 1024 }, (_, move) => ({ move, label: `Row ${move}`, kind: 'absolute', target: Number((move * 0.173 - 20).toFixed(3)), speed: 100 + move / 8, acceleration: 2000 + move }))
    const extra = Object.fromEntries(Array.from({ length: 976 }, (_, index) => [`Q-${String(index).padStart(4, '0')}`, Number((index * 1.37).toFixed(2))]))
    store({ setup, moves: many, extra })
    const lines = pdfText(await kit('pdf')).split('\n').map(words)
    const shown = (value: number) => formatNumber(value).replace('-', '−')
    const missingMoves = many.filter(({ move, target, speed, acceleration }) => !lines.some(line => line.includes(` Row ${move} absolute ${shown(target)} ${shown(speed)} ${acceleration}`)))
    const missingValues = Object.entries(extra).filter(([key, value]) => !lines.some(line => line.includes(`${key} ${shown(value)}`)))
    expect(missingMoves.map(({ move }) => move)).toEqual([])
    expect(missingValues).toEqual([])
  }, 60_000)
})

describe('the ZIP of a kit', () => {
  const own = Buffer.from('what the drive tool saved')
  const attachTo = (versionId: number) => {
    const path = join(plant.vault.folder, 'come')
    writeFileSync(path, own)
    attach(plant.vault, tobias, versionId, { path, size: own.length, sha256: createHash('sha256').update(own).digest('hex'), name: 'lid 02.drv', mediaType: '' }, {})
  }

  it('holds the sheet, the values in each form and the drive tool’s own backup first', async () => {
    attachTo(store())
    const files = unzipped(await kit('zip'))
    expect([...files.keys()].sort()).toEqual(['0-own-backup-of-SN-0001/1-lid_02.drv', '1-LID-02.Z-v1-sheet.pdf', '2-LID-02.Z-v1-kit.json', '3-LID-02.Z-v1-kit.csv', 'READ-THIS-FIRST.txt'])
    expect(files.get('0-own-backup-of-SN-0001/1-lid_02.drv')?.equals(own)).toBe(true)
    expect(pdfText(files.get('1-LID-02.Z-v1-sheet.pdf') ?? Buffer.alloc(0))).toContain('LID-02.Z')
    expect(readSettings(files.get('2-LID-02.Z-v1-kit.json') ?? Buffer.alloc(0))).toMatchObject({ ok: false, errors: [{ at: '/unit/serial', code: 'missing' }] })
  })
})
