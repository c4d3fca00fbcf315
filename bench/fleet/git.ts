import { execFileSync, spawn } from 'node:child_process'
import { mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { once } from 'node:events'
import type { PersonActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import { readUploadBytes } from '../../server/database/upload/queries'
import { listHistory } from '../../server/services/history/history'
import type { HistoryItem, HistoryQuery } from '../../shared/api/history'
import { atMost, median, type Figure } from '../figure'
import { elapsedOf } from './times'

/*
 * The same history and the same questions put to git 2 as people keep such files there: one JSON file an axis, one value a line,
 * one commit an upload, packed, its commit graph with Bloom filters of the changed paths. Both answer the same number of hits,
 * or nothing is measured. A process is started for each question, which is what asking git is.
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
  const ours = one.map(([axisId]) => all(vault, actor, { axis: String(axisId), field: 'frictionForce' }).length)
  same('one axis', ours.join(), one.map(([, tag]) => linesOf(tag)).join())
  same('all axes', all(vault, actor, { field: 'frictionForce' }).length, lines('-G"frictionForce"') - axes.length)
  const onAxis = median(elapsedOf(200, at => all(vault, actor, { axis: String(axes[at % axes.length]?.[0]), field: 'frictionForce' })))
  const gitOnAxis = median(elapsedOf(rounds, at => linesOf(axes[at % axes.length]?.[1] ?? '')))
  const everywhere = median(elapsedOf(rounds, () => all(vault, actor, { field: 'frictionForce' })))
  const gitEverywhere = median(elapsedOf(3, () => lines('-G"frictionForce"')))
  const newest = median(elapsedOf(200, () => listHistory(vault, actor, { field: 'frictionForce' })))
  const gitNewest = median(elapsedOf(rounds, () => lines('-G"frictionForce"', '-n', '50')))
  return [
    atMost(`one field on one axis of ${uploads.length} uploads, to git log -G (${gitOnAxis.toPrecision(3)} ms)`, onAxis / gitOnAxis, 0.01),
    atMost(`one field on all axes, every hit, to git log -G (${gitEverywhere.toPrecision(3)} ms)`, everywhere / gitEverywhere, 0.01),
    atMost(`one field on all axes, newest 50, to git log -G (${gitNewest.toPrecision(3)} ms)`, newest / gitNewest, 0.01),
  ]
}

function same(what: string, ours: number | string, theirs: number | string): void {
  if (ours !== theirs) throw new Error(`${what}: ${ours} hits here, ${theirs} in git: not the same question.`)
}

function all(vault: Vault, actor: PersonActor, query: HistoryQuery): HistoryItem[] {
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
