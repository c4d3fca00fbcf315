import type Database from 'better-sqlite3'
import { copyFileSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { OpenError } from '../../../server/database/read-only'
import { trailKeyOf, type TrailKey } from '../../../server/services/trail/key'
import { checkpointNow } from '../../../server/services/trail/trail'
import { verifyVault, type Verified } from '../../../server/services/verify/verify'
import { changeValue, cutTail, forgetTheEnd, recomputeAll, removeRow, seededRandom, swapRows, tamper, type Random } from '../../support/tamper'
import { tellAll } from '../../support/told-vault'
import { freshVault } from '../../support/vault'

let now = Date.parse('2026-03-01T06:00:00.000Z')
const { vault, folder, remove } = freshVault({ clock: () => now })
const copy = mkdtempSync(join(tmpdir(), 'witnessmark-'))
let elsewhere: string
let key: TrailKey

beforeAll(async () => {
  await tellAll(vault, (milliseconds) => { now += milliseconds })
  elsewhere = checkpointNow(vault).note
  key = trailKeyOf(vault)
  vault.close()
})
afterAll(() => {
  remove()
  rmSync(copy, { recursive: true, force: true })
})

type Tampering = (sqlite: Database.Database) => string
const outside = () => [{ from: 'the auditor’s checkpoint', note: elsewhere }]

/** Verifies a copy that somebody worked on. */
async function after(work: Tampering, checkpoints: { from: string, note: string }[] = []): Promise<{ did: string, verified: Verified }> {
  copyFileSync(join(folder, 'vault.sqlite'), join(copy, 'vault.sqlite'))
  const did = tamper(copy, work)
  return { did, verified: await verifyVault(copy, { derived: true, checkpoints }) }
}

describe('a vault that nobody touched', () => {
  it('is sound: log, rows, changes and judgements, and against a checkpoint kept elsewhere', async () => {
    const { did, verified } = await after(() => 'nothing', outside())
    expect([did, verified.faults, verified.found]).toEqual(['nothing', 0, []])
    expect(verified.entries).toBeGreaterThan(40)
    expect(verified.rows).toBeGreaterThan(35)
    expect(verified.derived).toEqual({ versions: 3, judgements: 4, older: 0 })
  })
  it('speaks of every kind of subject', async () => {
    const kinds: string[] = []
    await after((sqlite) => {
      kinds.push(...sqlite.prepare(`SELECT DISTINCT json_extract(leaf, '$.subject.kind') FROM log`).pluck().all() as string[])
      return 'looked'
    })
    expect(kinds).toHaveLength(28)
  })
})

it('a first judgement that is given other rules than it was judged by is found, whichever version it is of', async () => {
  for (const id of [1, 2, 3]) {
    for (const rules of ['1', '2', '99', 'x', '']) {
      const { verified } = await after((sqlite) => {
        sqlite.prepare('UPDATE check_set SET rule_set = ? WHERE id = ?').run(rules, id)
        return `rules ${rules}`
      })
      expect(verified.found, `${id} ${rules}`).toMatchObject([{ record: `version ${id}`, fault: expect.stringContaining('the version was judged by rules') as string }])
    }
  }
})

describe('plain SQL on a stopped vault', () => {
  const kinds: [string, number, (random: Random) => Tampering][] = [
    ['a value changed', 250, changeValue],
    ['a row removed', 100, removeRow],
    ['two rows exchanged', 100, swapRows],
    ['the end of the log cut off', 25, cutTail],
    ['a reason rewritten and everything recomputed, without the key', 15, random => recomputeAll(random, null)],
  ]
  it.each(kinds)('%s is found, %i times', async (_, times, make) => {
    const missed: string[] = []
    for (let seed = 1; seed <= times; seed += 1) {
      const { did, verified } = await after(make(seededRandom(seed * 7919)))
      if (verified.faults === 0) missed.push(`seed ${seed}: ${did}`)
    }
    expect(missed).toEqual([])
  }, 300_000)
})

describe('somebody who holds the signing key too', () => {
  it.each(Array.from({ length: 9 }, (_, i) => i + 1))('recomputes everything: unseen from within, found by a checkpoint kept elsewhere (%i)', async (seed) => {
    const rewrite = () => recomputeAll(seededRandom(seed * 104729), key)
    const within = await after(rewrite())
    expect([within.did, within.verified.found]).toEqual([within.did, []])
    const { verified } = await after(rewrite(), outside())
    expect(verified.found).toEqual([{ record: 'the auditor’s checkpoint', fault: expect.stringMatching(/has another root over \d+ entries than the log/) as string }])
  })
  it('cuts the end off with its rows: unseen from within, found by a checkpoint kept elsewhere', async () => {
    expect((await after(forgetTheEnd())).verified.found).toEqual([])
    expect((await after(forgetTheEnd(), outside())).verified.found).toEqual([{ record: 'the auditor’s checkpoint', fault: expect.stringMatching(/is over \d+ entries; the log has \d+: its end is cut off/) as string }])
  })
})

describe('what a fault says', () => {
  const found = async (sql: string) => (await after((sqlite) => {
    sqlite.exec(sql)
    return sql
  })).verified.found
  it.each([
    ['UPDATE version SET reason = \'as ordered\' WHERE id = 2', [{ record: 'version 2', fault: expect.stringMatching(/^is not what entry \d+ says: reason$/) as string }]],
    ['DELETE FROM sighting', [{ record: 'sighting 1', fault: expect.stringMatching(/^is gone; entry \d+ of the log speaks of it$/) as string }]],
    ['INSERT INTO waiver SELECT 9, axis_id, rule, places, covers, reason, until_at, given_at, given_by FROM waiver WHERE id = 1', [{ record: 'waiver 9', fault: 'is in no entry of the log' }]],
    ['UPDATE change SET after = 54 WHERE version_id = 2', [{ record: 'version 2', fault: 'its kept changes are not those between its content and its base' }]],
    ['UPDATE version SET scribe_code = \'AAAAA-AAAAA\' WHERE id = 1', [{ record: 'version 1', fault: 'its scribe code is not that of its content' }, { record: 'version 1', fault: expect.stringMatching(/scribeCode$/) as string }]],
    ['UPDATE upload SET bytes = x\'00\' WHERE id = 1', [{ record: 'upload 1', fault: 'its bytes cannot be unpacked' }]],
  ])('%s', async (sql, faults) => { expect(await found(sql)).toEqual(faults) })
  it('names a checkpoint that is none', async () => {
    const { verified } = await after(() => 'nothing', [{ from: 'a file', note: 'a shopping list' }])
    expect(verified.found).toEqual([{ record: 'a file', fault: 'A checkpoint has three lines (origin, size, root), an empty line, and its signatures.' }])
  })
})

describe('where there is nothing to verify', () => {
  it('says so', async () => {
    const empty = mkdtempSync(join(tmpdir(), 'witnessmark-'))
    await expect(verifyVault(empty)).rejects.toThrow(OpenError)
    await expect(verifyVault(empty)).rejects.toThrow('There is no vault in')
    rmSync(empty, { recursive: true })
  })
})
