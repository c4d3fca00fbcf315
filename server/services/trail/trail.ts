import type { z } from 'zod'
import { bytesToHex } from '@noble/hashes/utils.js'
import type { consistencyAnswer, keyAnswer, proofAnswer } from '#shared/api/trail'
import { Refusal } from '#shared/errors/refusal'
import { formatCheckpoint, formatVerifierKey } from '#shared/trail/checkpoint'
import { consistencyPath, inclusionPath } from '#shared/trail/proofs'
import { rootOf } from '#shared/trail/tree'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { logSize, subtreesOf } from '#server/database/log/nodes'
import { logQueries } from '#server/database/log/queries'
import { trailQueries } from '#server/database/trail/queries'
import { tellVault } from '../letters/queue'
import { sha256 } from '#server/database/sha256'
import { trailActor, trailKeyOf } from './key'

/** The log is read whole or not at all: a part of it proves nothing. */
export function assertReadsWhole(actor: Actor): void {
  if (actor.sites !== null) throw new Refusal('site-bounds', 'The log is read whole, by someone who sees all sites.')
}

/** How long the log is now and what its root is, signed; stores nothing. */
export function checkpointNow(vault: Vault): { note: string, size: number } {
  const key = trailKeyOf(vault)
  const size = logSize(vault.db)
  const root = rootOf(size, subtreesOf(vault.db), sha256)
  return { size, note: formatCheckpoint({ origin: key.verifier.name, size, root }, key.verifier, key.sign) }
}

/** Keeps the checkpoint of now, for the day's letter and for every later verification; its own log entry lies behind it. */
export function takeCheckpoint(vault: Vault): { id: number, note: string, size: number } {
  return vault.write(trailActor, (write) => {
    const { note, size } = checkpointNow(vault)
    const row = { size, note, takenAt: write.now }
    const id = trailQueries(vault.db).insertCheckpoint(row)
    write.log({ act: 'checkpoint-taken', id, state: { id, ...row } })
    tellVault(vault.db, write, 'checkpoint', { date: write.now.slice(0, 10), note })
    return { id, note, size }
  })
}

export function verifierKey(vault: Vault): z.infer<typeof keyAnswer> {
  const { verifier } = trailKeyOf(vault)
  return { name: verifier.name, publicKey: bytesToHex(verifier.publicKey), verifierKey: formatVerifierKey(verifier) }
}

/** That an entry is in the log of a size: today's where none is named. */
export function proveEntry({ db }: Vault, entry: number, size: number = logSize(db)): z.infer<typeof proofAnswer> {
  assertWithin(db, '?size', size)
  if (entry >= size) throw outside('?entry', `is not below ${size}`)
  const subtree = subtreesOf(db)
  return { entry, size, leafHash: bytesToHex(subtree(0, entry)), path: inclusionPath(entry, size, subtree, sha256).map(hash => bytesToHex(hash)) }
}

/** That the log of a later size begins with that of an earlier one. */
export function proveConsistency({ db }: Vault, from: number, to: number = logSize(db)): z.infer<typeof consistencyAnswer> {
  assertWithin(db, '?to', to)
  if (from > to) throw outside('?from', `is above ${to}`)
  return { from, to, path: consistencyPath(from, to, subtreesOf(db), sha256).map(hash => bytesToHex(hash)) }
}

function assertWithin(db: Vault['db'], at: string, size: number): void {
  const entries = logSize(db)
  if (size > entries) throw outside(at, `is above the ${entries} entries of the log`)
}

const outside = (at: string, message: string) => new Refusal('input', `${at}: ${message}.`, { errors: [{ at, code: 'range', message }] })

/** The log as a file, one leaf a line, as long as it is now; read page by page. How many bytes it has nobody knows before it is read. */
export function logFile({ db }: Vault): { chunks: Iterable<Buffer>, name: string } {
  const entries = logSize(db)
  return { chunks: linesOf(db, entries), name: `witnessmark-log-${entries}.jsonl` }
}

function* linesOf(db: Vault['db'], entries: number): Generator<Buffer> {
  for (let seq = 0; seq < entries; seq += filePage) {
    const rows = logQueries(db).from.all({ seq, limit: Math.min(filePage, entries - seq) })
    yield Buffer.from(rows.map(({ leaf }) => `${leaf}\n`).join(''), 'utf8')
  }
}

const filePage = 512
