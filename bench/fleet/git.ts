import { execFileSync, spawn } from 'node:child_process'
import { mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { once } from 'node:events'
import type { PersonActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import type { ChangeKey } from '../../server/database/history/keys'
import { readUploadBytes } from '../../server/database/upload/queries'
import { historyFilter } from '../../server/services/history/filter'
import { listHistory } from '../../server/services/history/history'
import { findKeys } from '../../server/services/history/merge'
import type { HistoryItem, HistoryQuery } from '../../shared/api/history'
import { atMost, median, type Figure } from '../figure'
import { elapsedOf } from './times'

/*
 * The same history and the same questions put to git 2 as people keep such files there: one JSON file an axis, one value a line,
 * one commit an upload, packed, its commit graph with Bloom filters of the changed paths. Both answer the same number of hits,
 * or nothing is measured. A process is started for each question, which is what asking git is.
 *
 * "Which": the numbers of the uploads, which is all that git answers. "Whole": what the page of history gets, for each hit who,
 * when, why, who allowed it and what became of the finding.
 */

const rounds = 9

interface Upload { readonly uploadId: number, readonly axisId: number, readonly tag: string, readonly at: number }

export async function measureGit(vault: Vault, actor: PersonActor): Promise<Figure[]> {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-peer-'))
  const git = (...args: string[]) => execFileSync('git', args, { cwd: folder, encoding: 'utf8', maxBuffer: 1 << 28, stdio: ['ignore', 'pipe', 'ignore'] })
  try {
    git('init', '--quiet', '--bare')
    const uploads = vault.sqlite.prepare(`SELECT v.upload_id AS uploadId, v.axis_id AS axisId, a.tag, CAST(strftime('%s', v.received_at) AS INTEGER) AS at
      FROM version v INNER JOIN axis a ON a.id = v.axis_id ORDER BY v.id`).all() as Upload[]
    await importAll(folder, vault, uploads)
    git('repack', '-a', '-d', '-q', '--depth=50', '--window=20')
    git('commit-graph', 'write', '--reachable', '--changed-paths')
    return [...questions(vault, actor, git, uploads), sizeFigure(vault, folder, uploads.length)]
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

async function importAll(folder: string, vault: Vault, uploads: readonly Upload[]): Promise<void> {
  const child = spawn('git', ['fast-import', '--quiet'], { cwd: folder, stdio: ['pipe', 'inherit', 'inherit'] })
  for (const { uploadId, tag, at } of uploads) {
    const text = JSON.stringify(JSON.parse(readUploadBytes(vault.db, uploadId).toString('utf8')), null, 1)
    const commit = `commit refs/heads/main\ncommitter vault <v@larkfield.example> ${at} +0000\ndata 0\nM 100644 inline axes/${tag}.json\ndata ${Buffer.byteLength(text)}\n${text}\n`
    if (!child.stdin.write(commit)) await once(child.stdin, 'drain')
  }
  child.stdin.end()
  const [code] = await once(child, 'close') as [number]
  if (code !== 0) throw new Error(`git fast-import ended with ${code}.`)
}

function questions(vault: Vault, actor: PersonActor, git: (...args: string[]) => string, uploads: readonly Upload[]): Figure[] {
  const first = new Map(uploads.toReversed().map(({ axisId, tag }) => [axisId, tag]))
  const axes = [...first]
  const lines = (...args: string[]) => git('log', '--format=%H', ...args, 'main').split('\n').filter(Boolean).length
  const linesOf = (tag: string) => git('log', '--format=%H', '-G"frictionForce"', 'main', '--', `axes/${tag}.json`).split('\n').filter(Boolean).length - 1
  const one = axes.slice(0, rounds)
  const everywhere = { field: 'frictionForce' }
  const onAxis = (at: number) => ({ axis: String(axes[at % axes.length]?.[0]), field: 'frictionForce' })
  same('one axis', one.map((_, at) => whole(vault, actor, onAxis(at)).length).join(), one.map(([, tag]) => linesOf(tag)).join())
  same('all axes, which', which(vault, actor, everywhere).length, lines('-G"frictionForce"') - axes.length)
  same('all axes, whole', whole(vault, actor, everywhere).length, which(vault, actor, everywhere).length)
  const peer = {
    axis: median(elapsedOf(rounds, at => linesOf(axes[at % axes.length]?.[1] ?? ''))),
    every: median(elapsedOf(3, () => lines('-G"frictionForce"'))),
    newest: median(elapsedOf(rounds, () => lines('-G"frictionForce"', '-n', '50'))),
  }
  const against = (name: string, theirs: number, least: number, askings: number, ask: (at: number) => unknown) =>
    atMost(`one field on ${name}, to git log -G (${theirs.toPrecision(3)} ms)`, median(elapsedOf(askings, ask)) / theirs, 1 / least)
  return [
    against(`one axis of ${uploads.length} uploads, every hit, whole`, peer.axis, 100, 200, at => whole(vault, actor, onAxis(at))),
    against('all axes, every hit, which', peer.every, 100, 50, () => which(vault, actor, everywhere)),
    against('all axes, newest 50, which', peer.newest, 100, 200, () => which(vault, actor, everywhere, 50)),
    against('all axes, newest 50, whole', peer.newest, 30, 200, () => listHistory(vault, actor, everywhere)),
  ]
}

/** The keys of the hits, newest first: all of them, or the newest `most`. */
function which(vault: Vault, actor: PersonActor, query: HistoryQuery, most = Number.POSITIVE_INFINITY): ChangeKey[] {
  const { plans, asked, stretch } = historyFilter(vault, actor, query)
  const keys: ChangeKey[] = []
  for (let after: ChangeKey | null = { versionId: stretch.last + 1, seq: 0 }; after !== null && keys.length < most;) {
    const found = findKeys(vault.sqlite, plans, asked, stretch, after, Math.min(most, 5000))
    keys.push(...found.keys)
    after = found.next
  }
  return keys
}

function same(what: string, ours: number | string, theirs: number | string): void {
  if (ours !== theirs) throw new Error(`${what}: ${ours} hits here, ${theirs} in git: not the same question.`)
}

function whole(vault: Vault, actor: PersonActor, query: HistoryQuery): HistoryItem[] {
  const items: HistoryItem[] = []
  for (let cursor: string | undefined; ;) {
    const page = listHistory(vault, actor, { ...query, limit: 200, ...(cursor === undefined ? {} : { cursor }) })
    items.push(...page.items)
    if (page.next === null) return items
    cursor = page.next
  }
}

/** Everything that the vault keeps of an upload, originals, judgements and log included, to what git keeps of the file alone. */
function sizeFigure({ sqlite }: Vault, folder: string, uploads: number): Figure {
  const page = Number(sqlite.pragma('page_size', { simple: true }))
  const ours = Number(sqlite.pragma('page_count', { simple: true })) * page / uploads
  const pack = join(folder, 'objects/pack')
  const theirs = readdirSync(pack).reduce((sum, name) => sum + statSync(join(pack, name)).size, 0) / uploads
  return atMost(`bytes a version, everything included (${Math.floor(ours)}), to git's pack and index (${Math.floor(theirs)})`, ours / theirs, 8)
}
