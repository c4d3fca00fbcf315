import { setImmediate } from 'node:timers/promises'
import type { z } from 'zod'
import type { reportFileQuery } from '#shared/api/reports'
import { formatExact } from '#shared/units/exact-time'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import { openReadOnly } from '#server/database/read-only'
import { Paper } from '../paper/paper'
import { plantOf } from '../people/plant'
import { trailKeyOf } from '../trail/key'
import { formatVerifierKey } from '#shared/trail/checkpoint'
import type { Block } from './blocks'
import { noteMaking } from './making'
import { ReportPages } from './pages'
import { headGap, paperBlocks } from './paper-blocks'
import { reportRow, siteOf, subjectOf, type NamedReport } from './reports'
import { spanOf } from './span'
import { tellReport } from './tell'

export interface ReportFile { readonly chunks: AsyncIterable<Buffer>, readonly mediaType: string, readonly name: string }

/** The file of a report, made while it is sent, of one moment of the vault's file. */
export function reportFile(vault: Vault, actor: Actor, id: number, { form = 'pdf', paper }: z.output<typeof reportFileQuery>): ReportFile {
  const found = reportRow(vault, actor, id)
  const head = headOf(vault, found)
  const name = `audit-report-${id}.${form}`
  if (form === 'json') return { chunks: overSnapshot(vault, db => jsonOf(db, found, head)), mediaType: 'application/json', name }
  return { chunks: overSnapshot(vault, db => paperOf(vault, db, found, head, paper ?? found.report.paper)), mediaType: 'application/pdf', name }
}

/** On a connection of its own: what is stored meanwhile does not get between the counting of the pages and their drawing. */
async function* overSnapshot({ folder }: Vault, make: (db: VaultDb) => AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
  const { sqlite, db } = openReadOnly(folder)
  try {
    sqlite.exec('BEGIN')
    yield* make(db)
  }
  finally {
    sqlite.close()
  }
}

interface Head { readonly plant: string, readonly subject: string, readonly zone: string, readonly period: string, readonly key: string }

function headOf(vault: Vault, { report }: NamedReport): Head {
  const zone = siteOf(vault.db, report)?.timeZone ?? 'UTC'
  const { fromAt, toAt, askedAt } = report
  return {
    plant: plantOf(vault), subject: subjectOf(vault.db, report), zone, key: formatVerifierKey(trailKeyOf(vault).verifier),
    period: `${fromAt === null ? 'from the first version' : `from ${formatExact(fromAt, zone)}`} until ${formatExact(toAt === null || toAt > askedAt ? askedAt : toAt, zone)}`,
  }
}

const yieldAfter = 200

async function* jsonOf(db: VaultDb, { report, asker }: NamedReport, { plant, subject, zone, period, key }: Head): AsyncGenerator<Buffer> {
  const { id, scope, scopeId, fromAt, toAt, askedAt, size, note } = report
  yield Buffer.from(`{"report":${JSON.stringify({ id, plant, scope, scopeId, subject, timeZone: zone, period, from: fromAt, to: toAt, askedAt, askedBy: asker, size, checkpoint: note, key })},"parts":[`)
  let lines: string[] = []
  let begun = false
  for (const part of tellReport(spanOf(db, report))) {
    lines.push(`${begun ? ',' : ''}\n${JSON.stringify(part)}`)
    begun = true
    if (lines.length < yieldAfter) continue
    yield Buffer.from(lines.join(''))
    lines = []
    await setImmediate()
  }
  yield Buffer.from(`${lines.join('')}\n]}\n`)
}

async function* paperOf(vault: Vault, db: VaultDb, found: NamedReport, head: Head, size: 'A4' | 'Letter'): AsyncGenerator<Buffer> {
  const { report } = found
  const span = spanOf(db, report)
  const blocks = function* (): Generator<Block> {
    yield* headBlocks(found, head)
    yield* paperBlocks(tellReport(span), footBlocks(found, head))
  }
  const title = `Audit report ${report.id}${head.plant === '' ? '' : `, ${head.plant}`}`
  const words = { title, subject: head.subject, foot: `asked for ${formatExact(report.askedAt, head.zone)} by ${found.asker}; log of ${report.size} entries` }
  const paper = () => new Paper(size, { title: `${title}, ${head.subject}`, at: report.askedAt, kept: false })
  try {
    const scrap = paper()
    const counted = new ReportPages(scrap, words, null)
    for await (const pages of turning(counted, blocks())) {
      scrap.taken()
      noteMaking(vault, report.id, { pages, of: null })
    }
    const made = paper()
    const drawn = new ReportPages(made, words, counted.pages)
    for await (const pages of turning(drawn, blocks())) {
      noteMaking(vault, report.id, { pages, of: counted.pages })
      yield made.taken()
    }
    yield await made.bytes()
  }
  finally {
    noteMaking(vault, report.id, null)
  }
}

/** Puts block after block, and lets others have their turn with every page. */
async function* turning(pages: ReportPages, blocks: Iterable<Block>): AsyncGenerator<number> {
  let last = 0
  for (const block of blocks) {
    pages.put(block)
    if (pages.pages === last) continue
    last = pages.pages
    yield last
    await setImmediate()
  }
}

function* headBlocks({ report, asker }: NamedReport, { subject, period, zone }: Head): Generator<Block> {
  yield { kind: 'heading', level: 1, text: `Audit report ${report.id}: ${subject}` }
  yield { kind: 'fact', label: 'Of which place', value: report.scope === null ? subject : `${report.scope} ${subject}` }
  yield { kind: 'fact', label: 'Of which time', value: `${period}, by when the vault received it` }
  yield { kind: 'fact', label: 'Asked for by', value: `${asker}, ${formatExact(report.askedAt, zone)}` }
  yield { kind: 'fact', label: 'Times', value: `in the zone of the site, named behind each; the head in ${zone}` }
  yield { kind: 'fact', label: 'Rests on', value: `the log up to entry ${report.size - 1}, ${report.size} entries, by the checkpoint at the end` }
  yield { kind: 'gap', height: headGap }
  yield { kind: 'text', text: 'Everything that the vault holds of that place and time: versions with every change, marks, findings with all that was said of them, planned changes, waivers, swaps, and each signature with name, time and meaning. “Log entry” is the number in the log: its proof is reckoned on the trail page, or by the verifier that needs no server. What was done after it was asked for is not in it; names of people and places are those of today. Newtons are by the nameplate of the unit as it was then.' }
}

function* footBlocks({ report }: NamedReport, { key }: Head): Generator<Block> {
  yield { kind: 'heading', level: 1, text: 'Checkpoint of the log' }
  yield { kind: 'text', text: 'Signed over every entry of the log when this report was asked for. The key lies beside the database, so it proves something only together with a copy that was kept elsewhere, this paper for instance.' }
  for (const line of report.note.trimEnd().split('\n')) yield line === '' ? { kind: 'gap', height: headGap } : { kind: 'text', text: line, face: 'mono', size: 7.5 }
  yield { kind: 'text', text: `Key: ${key}`, face: 'mono', size: 7.5 }
}
