import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { reportForms } from '../../../../shared/api/reports'
import type { Actor, PersonActor } from '../../../../server/database/actor'
import { parseLeaf } from '../../../../shared/trail/entry'
import { leafAt } from '../../../../server/database/log/queries'
import { closeFinding, explainFinding } from '../../../../server/services/findings/findings'
import { markKnownGood } from '../../../../server/services/known-good/mark'
import { announceChange, endPlannedChange } from '../../../../server/services/planned-changes/planned-changes'
import type { EndPart, FindingPart, ReportPart, SignaturePart, VersionPart } from '../../../../server/services/reports/parts'
import { reportFile } from '../../../../server/services/reports/report-file'
import { askReport, listReports, readReport } from '../../../../server/services/reports/reports'
import { checkpointNow } from '../../../../server/services/trail/trail'
import { voidVersion } from '../../../../server/services/versions/void-version'
import { endWaiver, giveWaiver } from '../../../../server/services/waivers/waivers'
import { codeOf } from '../../../support/codes'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { pageSizes, pdfText } from '../../../support/paper'
import { day, hour, iso, minute, start } from '../../../support/vault-plant'

let plant: FindingsPlant
beforeEach(() => { plant = openFindingsPlant({ marked: true, watched: ['jogSpeed'] }) })
afterEach(() => plant.close())

type Asked = Parameters<typeof askReport>[2]
const ask = (asked: Asked = {}, as: PersonActor = plant.ines) => askReport(plant.vault, as, asked).id

async function fileOf(id: number, form: (typeof reportForms)[number], as: Actor = plant.ines): Promise<Buffer> {
  const chunks: Buffer[] = []
  for await (const chunk of reportFile(plant.vault, as, id, { form }).chunks) chunks.push(chunk)
  return Buffer.concat(chunks)
}
interface Told { readonly report: Record<string, unknown>, readonly parts: readonly ReportPart[] }
const json = async (asked: Asked = {}) => JSON.parse((await fileOf(ask(asked), 'json')).toString('utf8')) as Told
const paper = async (asked: Asked = {}) => pdfText(await fileOf(ask(asked), 'pdf'))
const ofKind = <Kind extends ReportPart['kind']>({ parts }: Told, kind: Kind) => parts.filter((part): part is Extract<ReportPart, { kind: Kind }> => part.kind === kind)
/** Without the line breaks of its columns. */
const packed = (text: string) => text.replaceAll(/\s+/g, '')

const nameplate = { model: 'HL40-200V', axisKind: 'linear', stroke: 200, forceBase: 'rated-thrust', ratedThrust: 640 } as const

/** A limit raised at night, explained, closed by another; a plan, waivers, a wrong upload. */
function story(): void {
  const { vault, runa, tobias, ines, axisId } = plant
  plant.nameplate(nameplate)
  plant.upload({ thrustLimit: 55, speedLimit: 500 })
  plant.now += hour
  explainFinding(vault, tobias, 1, { text: 'Lids stood proud.', by: 'Night shift', at: iso(plant.now - hour), workOrder: 'WO 4711' })
  closeFinding(vault, ines, 1, { as: 'accepted', allowedBy: 'Marit Lund' })
  announceChange(vault, runa, { axisIds: [axisId], fields: ['thrustLimit', 'jogSpeed'], ranges: [{ field: 'thrustLimit', max: 50 }, { field: 'jogSpeed', min: 10, max: 20 }], from: iso(plant.now), until: iso(plant.now + day), reason: 'thicker lids', allowedBy: 'Marit Lund' })
  plant.upload({ thrustLimit: 45, jogSpeed: 15, speedLimit: 500 }, { fields: { reason: 'as announced', workOrder: 'WO 4712', changedBy: `person:${tobias.id}`, allowedBy: 'Marit Lund' } })
  endPlannedChange(vault, runa, 1, { reason: 'done' })
  const waiver = (reason: string) => giveWaiver(vault, runa, { axisId, rule: 'travel-span', at: [], value: { level: 'unknown', missing: ['homingMethod'] }, reason, until: iso(plant.now + 30 * day) }).id
  waiver('measured at the stop')
  endWaiver(vault, runa, waiver('taken by mistake'), { reason: 'not needed' })
  const wrong = plant.upload({ thrustLimit: 90, speedLimit: 500 })
  voidVersion(vault, runa, wrong.version.id, 'the wrong drive was plugged in')
  markKnownGood(vault, runa, plant.upload({ thrustLimit: 45, jogSpeed: 15, speedLimit: 500, homingSpeed: 20 }).version.id, { meaning: 'reviewed', note: 'after the trial run' })
  plant.now += hour
}

describe('an audit report', () => {
  it('tells versions with who, when and why, changes with newtons, and the entry of the log that says the same', async () => {
    story()
    const told = await json({ scope: 'axis', scopeId: plant.axisId })
    const versions = ofKind(told, 'version')
    expect(versions.map(({ number }) => number)).toEqual([1, 2, 3, 4, 5])
    expect(versions[1]).toMatchObject({
      tag: 'LID-02.Z', occasion: 'routine', storedBy: 'Tobias Achterberg', changedBy: null, reason: null, base: { number: 1 }, findingId: 1, serial: 'SN-1',
      changes: [{ section: 'setup', field: 'thrustLimit', before: 38, after: 55, unit: '%', newtons: { before: '243.2 N', after: '352 N' }, weight: 'harm', watched: true }],
    })
    expect(versions[2]).toMatchObject({ changedBy: 'Tobias Achterberg', allowedBy: 'Marit Lund', reason: 'as announced', workOrder: 'WO 4712' })
    expect(versions[3]?.void).toMatchObject({ by: 'Runa Haldersen', reason: 'the wrong drive was plugged in' })
    for (const { entry, versionId } of versions) expect(parseLeaf(leafAt(plant.vault.db, entry ?? -1) ?? '')).toMatchObject({ act: 'version-stored', subject: { id: versionId } })
  })

  it('tells findings with every word, plans with their ranges, waivers, and marks', async () => {
    story()
    const told = await json({ scope: 'axis', scopeId: plant.axisId })
    const [finding] = ofKind(told, 'finding')
    expect(finding).toMatchObject({ findingId: 1, state: 'closed', shown: [{ tag: 'LID-02.Z', number: 2 }], acts: [
      { kind: 'explained', by: 'Tobias Achterberg', text: 'Lids stood proud.', madeBy: 'Night shift', workOrder: 'WO 4711' },
      { kind: 'closed', by: 'Ines Okafor', as: 'accepted', allowedBy: 'Marit Lund' },
    ] })
    expect(ofKind(told, 'planned-change')).toMatchObject([{ fields: ['thrust limit, at most 50 %', 'jog speed, 10 to 20 mm/s'], allowedBy: 'Marit Lund', ended: { reason: 'done' }, explained: [2] }])
    expect(ofKind(told, 'waiver').map(({ reason, ended }) => [reason, ended?.reason])).toEqual([['measured at the stop', undefined], ['taken by mistake', 'not needed']])
    expect(ofKind(told, 'mark').map(({ number, meaning, by }) => [number, meaning, by])).toEqual([[1, 'approved', 'Runa Haldersen'], [5, 'reviewed', 'Runa Haldersen']])
  })

  it('lists each signature with name, time and meaning, in order of time, and the entry that proves it (21 CFR 11.50)', async () => {
    story()
    const told = await json()
    const signatures: SignaturePart[] = ofKind(told, 'signature')
    expect(signatures.map(({ name, meaning, of }) => [name, meaning, of])).toEqual([
      ['Runa Haldersen', 'approved', 'LID-02.Z v1 known-good'],
      ['Ines Okafor', 'closes it as accepted, allowed by Marit Lund', 'finding 1'],
      ['Runa Haldersen', 'accepts the risk until the end of the waiver', expect.stringContaining('waiver 1, LID-02.Z')],
      ['Runa Haldersen', 'accepts the risk until the end of the waiver', expect.stringContaining('waiver 2')],
      ['Runa Haldersen', 'takes the waiver back', expect.stringContaining('waiver 2')],
      ['Runa Haldersen', 'sets it aside as a wrong upload', 'LID-02.Z v4'],
      ['Runa Haldersen', 'reviewed', 'LID-02.Z v5 known-good'],
    ])
    const acts = signatures.map(({ entry }) => parseLeaf(leafAt(plant.vault.db, entry ?? -1) ?? '')).map(({ act, at }) => [act, at])
    expect(acts.map(([act]) => act)).toEqual(['known-good-marked', 'finding-closed', 'waiver-given', 'waiver-given', 'waiver-ended', 'version-voided', 'known-good-marked'])
    expect(acts.map(([, at]) => at)).toEqual(signatures.map(({ at }) => at))
  })

  it('prints on paper all that its JSON holds, each page numbered, with the checkpoint of when it was asked for', async () => {
    story()
    const note = checkpointNow(plant.vault).note
    const id = ask({ scope: 'axis', scopeId: plant.axisId })
    const pdf = await fileOf(id, 'pdf')
    const pages = pdfText(pdf).split('\f').slice(0, -1)
    expect(pageSizes(pdf)).toEqual(pages.map(() => [595.28, 841.89]))
    for (const [index, page] of pages.entries()) expect(page).toContain(`page ${index + 1} of ${pages.length}`)
    const text = packed(pages.join('\n'))
    for (const words of ['Audit report 1: LID-02.Z', 'LID-02.Z v2, routine', '38 % (243.2 N)', '55 % (352 N)', 'Lids stood proud.', 'done by Night shift', 'closed as accepted, allowed by Marit Lund', 'thrust limit, at most 50 %', 'measured at the stop', 'the wrong drive was plugged in', 'after the trial run', 'in Europe/Berlin', 'Tobias Achterberg, changed by nobody named', '5 versions']) expect(text).toContain(packed(words))
    for (const line of note.trimEnd().split('\n').filter(Boolean)) expect(text).toContain(packed(line))
    const told = JSON.parse((await fileOf(id, 'json')).toString('utf8')) as Told
    expect(told.report).toMatchObject({ id, subject: 'LID-02.Z', askedBy: 'Ines Okafor', checkpoint: note, timeZone: 'Europe/Berlin' })
    const signed = pages.join('\n').split(/^\s*Signatures$/m)[1] ?? ''
    for (const { name, meaning, entry } of ofKind(told, 'signature')) {
      expect(signed).toMatch(new RegExp(`^ *${name.split(' ')[0]}\\b.* CET.*\\b${entry}$`, 'm'))
      for (const word of meaning.split(' ')) expect(signed).toContain(word)
    }
  })

  it('is of its period: from including, to not including, and what stood open in it', async () => {
    story()
    const versions = await json({ from: iso(start + hour + minute), to: iso(start + 5 * hour) })
    expect(ofKind(versions, 'version').map(({ number }) => number)).toEqual([2, 3])
    const before = await json({ scope: 'axis', scopeId: plant.axisId, to: iso(start + hour) })
    expect(before.parts.map(({ kind }) => kind)).toEqual(['axis', 'not-read', 'end'])
    expect(ofKind(before, 'not-read')).toEqual([{ kind: 'not-read', tags: ['LID-02.Z'] }])
    expect(await paper({ scope: 'axis', scopeId: plant.axisId, to: iso(start + hour) })).toMatch(/No finding was open in that time\.[\s\S]*Nobody signed anything\.[\s\S]*No file came from this axis/)
  })

  it('lists the signature under which a version of its period was set aside later', async () => {
    const wrong = plant.upload({ thrustLimit: 90, speedLimit: 500 }).version
    const to = iso(plant.now + minute)
    plant.now += hour
    voidVersion(plant.vault, plant.runa, wrong.id, 'the wrong drive was plugged in')
    plant.now += hour
    const told = await json({ from: iso(start + 90 * minute), to })
    expect(ofKind(told, 'version').map(({ number, void: aside }) => [number, aside?.by])).toEqual([[2, 'Runa Haldersen']])
    expect(ofKind(told, 'signature').map(({ of, name }) => [of, name])).toEqual([['LID-02.Z v2', 'Runa Haldersen']])
  })

  it('holds what the vault held when it was asked for, whenever it is printed', async () => {
    plant.upload({ thrustLimit: 55, speedLimit: 500 })
    plant.now += minute
    const id = ask()
    const first = await fileOf(id, 'json')
    plant.now += minute
    explainFinding(plant.vault, plant.tobias, 1, { text: 'Lids stood proud.' })
    closeFinding(plant.vault, plant.ines, 1, { as: 'accepted', allowedBy: 'Marit Lund' })
    plant.upload({ thrustLimit: 60, speedLimit: 500 })
    expect((await fileOf(id, 'json')).equals(first)).toBe(true)
    const later: FindingPart[] = ofKind(await json(), 'finding')
    expect(later.map(({ state }) => state)).toEqual(['closed', 'open'])
  })

  it('is an act in the log, names its asker, and tells its progress to none once it is made', async () => {
    const id = ask({ scope: 'axis', scopeId: plant.axisId, paper: 'Letter' })
    const entry = parseLeaf(leafAt(plant.vault.db, checkpointNow(plant.vault).size - 1) ?? '')
    expect(entry).toMatchObject({ act: 'report-asked', actor: { name: 'Ines Okafor' }, subject: { kind: 'report', id }, state: { scope: 'axis', scopeId: plant.axisId, paper: 'Letter' } })
    expect(pageSizes(await fileOf(id, 'pdf'))[0]).toEqual([612, 792])
    expect(readReport(plant.vault, plant.ines, id)).toMatchObject({ subject: 'LID-02.Z', paper: 'Letter', askedBy: 'Ines Okafor', timeZone: 'Europe/Berlin', making: null })
  })

  it('tells nobody of sites that they do not see', () => {
    const other = plant.machineAt('Otherfield')
    const bound = plant.person('Bo Lind', ['auditor'], [other.siteId])
    const whole = ask()
    const own = ask({}, bound)
    const here = ask({ scope: 'machine', scopeId: plant.machineId })
    expect(codeOf(() => ask({ scope: 'axis', scopeId: plant.axisId }, bound))).toBe('not-found')
    for (const id of [whole, here]) expect(codeOf(() => reportFile(plant.vault, bound, id, {}))).toBe('not-found')
    expect(listReports(plant.vault, bound, {}).items.map(({ id }) => id)).toEqual([own])
    expect(listReports(plant.vault, plant.ines, {}).items.map(({ id }) => id)).toEqual([here, own, whole])
    expect(listReports(plant.vault, plant.ines, { scope: 'machine', scopeId: plant.machineId }).items.map(({ id }) => id)).toEqual([here])
    expect(codeOf(() => ask({ from: iso(start + day), to: iso(start) }))).toBe('time-order')
  })
})

it('prints ten thousand changes whole, and keeps no more than a page in memory', async () => {
  const rows = 500
  for (let step = 1; step <= 20; step += 1) {
    const extra = Object.fromEntries(Array.from({ length: rows }, (_, key) => [`K-${String(key).padStart(3, '0')}`, step * 1000 + key]))
    plant.upload({ thrustLimit: 38, speedLimit: 500 }, { parts: { extra } })
  }
  plant.now += minute
  const id = ask({ scope: 'axis', scopeId: plant.axisId })
  let largest = 0
  const chunks: Buffer[] = []
  for await (const chunk of reportFile(plant.vault, plant.ines, id, {}).chunks) {
    largest = Math.max(largest, chunk.length)
    chunks.push(chunk)
  }
  const text = pdfText(Buffer.concat(chunks))
  const told = JSON.parse((await fileOf(id, 'json')).toString('utf8')) as Told
  const changes = ofKind(told, 'version').flatMap(({ changes: each }: VersionPart) => each)
  expect(changes).toHaveLength(20 * rows)
  const printed = new Map([...text.matchAll(/extra (K-\d{3})\s+(not set|\d+)\s+(\d+)/g)].map(match => [`${match[1]} ${match[3]}`, match[2]]))
  expect(printed.size).toBe(20 * rows)
  for (const { field, before, after } of changes) expect(printed.get(`${field} ${String(after)}`)).toBe(before === null ? 'not set' : String(before))
  expect(text).toContain(`${20 * rows} changes`)
  const [end]: EndPart[] = ofKind(told, 'end')
  expect(end?.counts.change).toBe(20 * rows)
  expect(largest).toBeLessThan(400_000)
}, 120_000)
