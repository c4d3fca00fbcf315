import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { logQueries } from '../../../server/database/log/queries'
import { checkpointNow, verifierKey } from '../../../server/services/trail/trail'
import { recordTrailKey, trailActor } from '../../../server/services/trail/key'
import { freshVault } from '../../support/vault'

/* The verifier that an auditor runs: one file, plain Node, nothing of ours beside it. */
const verifier = fileURLToPath(new URL('../../../public/verify-log.mjs', import.meta.url))
const { vault, remove } = freshVault()
const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
const path = (name: string) => join(folder, name)
let lines: string[]
let key: string

beforeAll(() => {
  recordTrailKey(vault)
  const act = (i: number) => vault.write(trailActor, ({ log }) => log({ act: 'vault-set-up', id: 'vault', state: { i, words: 'ä “quoted” \\ and 1e21', share: 0.1 } }))
  for (let i = 0; i < 20; i += 1) act(i)
  writeFileSync(path('early.txt'), checkpointNow(vault).note)
  for (let i = 20; i < 50; i += 1) act(i)
  writeFileSync(path('late.txt'), checkpointNow(vault).note)
  key = verifierKey(vault).verifierKey
  lines = logQueries(vault.db).from.all({ seq: 0, limit: 1000 }).map(({ leaf }) => leaf)
})
afterAll(() => {
  remove()
  rmSync(folder, { recursive: true, force: true })
})

function run(log: readonly string[], ...more: string[]): { code: number | null, out: string, err: string } {
  writeFileSync(path('log.jsonl'), log.map(line => `${line}\n`).join(''))
  const { status, stdout, stderr } = spawnSync(process.execPath, [verifier, path('log.jsonl'), ...more], { encoding: 'utf8' })
  return { code: status, out: stdout, err: stderr }
}
const both = () => ['--checkpoint', path('early.txt'), '--checkpoint', path('late.txt')]

describe('the verifier in one file', () => {
  it('holds the log against both checkpoints, by the key of the log and by one written down', () => {
    for (const more of [both(), [...both(), '--key', key]]) {
      const { code, out, err } = run(lines, ...more)
      expect([code, err]).toEqual([0, ''])
      expect(out).toContain('51 entries, root ')
      expect(out).toContain('All holds.')
    }
  })
  it('runs where there is no package at all', () => {
    expect(execFileSync(process.execPath, [verifier, path('log.jsonl')], { cwd: tmpdir(), encoding: 'utf8', env: {} })).toContain('only one that was kept elsewhere proves')
  })
  it('finds every single character changed in an entry', () => {
    const target = lines[7] ?? ''
    for (let at = 1; at < target.length; at += 23) {
      const altered = `${target.slice(0, at)}${target[at] === '7' ? '8' : '7'}${target.slice(at + 1)}`
      const { code, err } = run(lines.map((line, i) => i === 7 ? altered : line), ...both())
      expect([at, code]).toEqual([at, 1])
      expect(err).toContain('early.txt: has another root over 21 entries')
    }
  })
  it.each([
    ['an entry taken out', (all: string[]) => all.filter((_, i) => i !== 30), 'entry 30: says that it is entry 31'],
    ['two entries exchanged', (all: string[]) => all.map((line, i) => i === 3 ? all[4] ?? '' : i === 4 ? all[3] ?? '' : line), 'entry 3: says that it is entry 4'],
    ['the end cut off', (all: string[]) => all.slice(0, 40), 'late.txt: is over 51 entries; the log has 40: its end is cut off'],
    ['a line that is none', (all: string[]) => [...all.slice(0, 50), 'a shopping list'], 'entry 50: cannot be read'],
  ])('finds %s', (_, alter, words) => {
    const { code, err } = run(alter(lines), ...both())
    expect(code).toBe(1)
    expect(err).toContain(words)
  })
  it('finds a checkpoint that another key signed', () => {
    const other = freshVault()
    recordTrailKey(other.vault)
    const { code, err } = run(lines, ...both(), '--key', verifierKey(other.vault).verifierKey)
    expect(code).toBe(1)
    expect(err).toMatch(/early\.txt: bears no sound signature of witnessmark\/[0-9a-f]{12}/)
    other.remove()
  })
  it('says how it is called', () => expect(spawnSync(process.execPath, [verifier], { encoding: 'utf8' }).status).toBe(2))
})
