import { createHash, randomBytes } from 'node:crypto'
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { parseLeaf } from '../../../shared/trail/entry'
import type { PersonActor } from '../../../server/database/actor'
import { attachmentBytes, DamagedAttachment } from '../../../server/database/attachment/queries'
import { readAxisState } from '../../../server/database/axis-state/queries'
import { log } from '../../../server/database/schema'
import { attach } from '../../../server/services/attachments/attach'
import { attachmentFile, listAttachments } from '../../../server/services/attachments/read-attachments'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { openPlant, settingsFile, start, day, type Plant } from '../../support/vault-plant'

let plant: Plant
let tobias: PersonActor
let axisId: number
let versionId: number

const hashOf = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex')
const chunk = 256 * 1024

beforeEach(() => {
  plant = openPlant()
  tobias = plant.person('Tobias Achterberg', ['technician'])
  axisId = plant.axis('LID-02.Z')
  plant.fit(axisId, plant.unit('SN-0001'), start - 300 * day)
  const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup: { thrustLimit: 38 } }), name: null }, {})
  versionId = outcome.outcome === 'version' ? outcome.answer.version.id : 0
})
afterEach(() => plant.close())

function come(bytes: Buffer, name: string | null = 'lid-02.drv') {
  const path = join(plant.vault.folder, `come-${hashOf(bytes).slice(0, 8)}`)
  writeFileSync(path, bytes)
  return { path, size: bytes.length, sha256: hashOf(bytes), name, mediaType: 'application/octet-stream' }
}
const out = (id: number) => Buffer.concat([...attachmentFile(plant.vault, id).chunks])

describe('an attachment', () => {
  it.each([1, chunk - 1, chunk, chunk + 1, 3 * chunk + 7])('of %i bytes comes out as it went in, chunk by chunk', (size) => {
    const bytes = randomBytes(size)
    const { id } = attach(plant.vault, tobias, versionId, come(bytes), {})
    expect(out(id).equals(bytes)).toBe(true)
    expect([...attachmentFile(plant.vault, id).chunks]).toHaveLength(Math.ceil(size / chunk))
  })

  it('says whose own values it holds, and stands with its version, the drive’s own backups first', () => {
    attach(plant.vault, tobias, versionId, come(randomBytes(10), 'plate.jpg'), { kind: 'photo', note: 'the plate' })
    const backup = attach(plant.vault, tobias, versionId, come(randomBytes(11)), { kind: 'drive-backup' })
    expect(backup).toMatchObject({ kind: 'drive-backup', name: 'lid-02.drv', size: 11, by: 'Tobias Achterberg', unit: { serial: 'SN-0001', model: 'HL40-200V' } })
    expect(listAttachments(plant.vault.db, versionId).items.map(({ kind, note }) => [kind, note])).toEqual([['drive-backup', null], ['photo', 'the plate']])
  })

  it('without a name gets one from its hash', () => {
    const bytes = Buffer.from('x')
    expect(attach(plant.vault, tobias, versionId, come(bytes, null), { kind: 'other' }).name).toBe(`other-${hashOf(bytes).slice(0, 8)}`)
  })

  it('is kept once a version', () => {
    attach(plant.vault, tobias, versionId, come(Buffer.from('x')), {})
    const before = plant.rows()
    expect(() => attach(plant.vault, tobias, versionId, come(Buffer.from('x'), 'other.drv'), {})).toThrow(expect.objectContaining({ code: 'taken' }))
    expect(plant.rows()).toEqual(before)
  })

  it('is logged whole but for its bytes', () => {
    const { id, sha256 } = attach(plant.vault, tobias, versionId, come(Buffer.from('own bytes')), { note: 'n' })
    const entry = parseLeaf(plant.vault.db.select().from(log).all().at(-1)?.leaf ?? '')
    expect(entry).toMatchObject({ act: 'attachment-stored', subject: { kind: 'attachment', id }, state: { id, versionId, sha256, size: 9, note: 'n', name: 'lid-02.drv', personId: tobias.id } })
  })

  it('counts for readiness where it is a backup with the known-good version', () => {
    const runa = plant.person('Runa Haldersen')
    const backups = () => readAxisState(plant.vault.db, axisId)?.backups
    attach(plant.vault, tobias, versionId, come(Buffer.from('photo')), { kind: 'photo' })
    attach(plant.vault, tobias, versionId, come(Buffer.from('backup')), {})
    expect(backups()).toBe(0)
    markKnownGood(plant.vault, runa, versionId, { meaning: 'approved' })
    expect(backups()).toBe(1)
    attach(plant.vault, tobias, versionId, come(Buffer.from('a second')), {})
    expect(backups()).toBe(2)
  })
})

describe('stored bytes that were altered', () => {
  // The first byte is none that the first damage would leave as it is.
  const bytes = Buffer.concat([Buffer.of(1), randomBytes(2 * chunk + 4)])
  const damage = (sql: string) => plant.vault.sqlite.exec(`DROP TRIGGER attachment_chunk_no_update; DROP TRIGGER attachment_chunk_no_delete; ${sql}`)

  it.each([
    ['one byte', 'UPDATE attachment_chunk SET bytes = CAST(x\'00\' || substr(bytes, 2) AS BLOB) WHERE seq = 0'],
    ['a chunk in the middle gone', 'DELETE FROM attachment_chunk WHERE seq = 1'],
    ['the last chunk gone', 'DELETE FROM attachment_chunk WHERE seq = 2'],
    ['the last chunk longer', 'UPDATE attachment_chunk SET bytes = CAST(bytes || x\'00\' AS BLOB) WHERE seq = 2'],
    ['two chunks changed places', 'UPDATE attachment_chunk SET seq = 9 WHERE seq = 0; UPDATE attachment_chunk SET seq = 0 WHERE seq = 1; UPDATE attachment_chunk SET seq = 1 WHERE seq = 9'],
  ])('%s: the end never comes', (_what, sql) => {
    const row = attach(plant.vault, tobias, versionId, come(bytes), {})
    damage(sql)
    const got: Buffer[] = []
    expect(() => {
      for (const part of attachmentBytes(plant.vault.db, row)) got.push(part)
    }).toThrow(DamagedAttachment)
    expect(Buffer.concat(got).length).toBeLessThan(bytes.length)
  })
})
