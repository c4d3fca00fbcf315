import { spawnSync } from 'node:child_process'
import { copyFileSync, cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import Database from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { checkpointNow } from '../../server/services/trail/trail'
import { cutTail, seededRandom, tamper } from '../support/tamper'
import { tellAll } from '../support/told-vault'
import { freshVault } from '../support/vault'

/* What is deployed without sources: a copy of the built server far from the tree, and nothing else. */
const root = fileURLToPath(new URL('../..', import.meta.url))
const deployed = mkdtempSync(join(tmpdir(), 'witnessmark-deployed-'))
let now = Date.parse('2026-03-01T06:00:00.000Z')
const { vault, folder, remove } = freshVault({ clock: () => now })

beforeAll(async () => {
  cpSync(join(root, '.output/server'), join(deployed, 'server'), { recursive: true, verbatimSymlinks: true })
  await tellAll(vault, (milliseconds) => { now += milliseconds })
  writeFileSync(join(deployed, 'checkpoint.txt'), checkpointNow(vault).note)
  vault.close()
})
afterAll(() => {
  remove()
  rmSync(deployed, { recursive: true, force: true })
})

function verify(...given: string[]): { code: number | null, out: string, err: string } {
  const { status, stdout, stderr } = spawnSync(process.execPath, [join(deployed, 'server/commands/verify.mjs'), ...given], { cwd: deployed, encoding: 'utf8', env: { PATH: process.env.PATH } })
  return { code: status, out: stdout, err: stderr }
}

describe('commands of a built server without sources', () => {
  it('are all there', () => {
    const commands = readdirSync(join(root, 'server/commands')).map(name => name.replace(/\.ts$/, '.mjs'))
    expect(commands.length).toBeGreaterThan(0)
    expect(commands.filter(name => !existsSync(join(deployed, 'server/commands', name)))).toEqual([])
  })

  it('verify a sound vault, whole, against a checkpoint kept elsewhere', () => {
    const { code, out, err } = verify(folder, '--derived', '--reread', '--checkpoint', 'checkpoint.txt')
    expect([code, err]).toEqual([0, ''])
    expect(out).toMatch(/^\d+ entries, \d+ records held against them\.\n3 versions compared again/)
    expect(out).toContain('Sound.')
  })

  it('end with 1 where the end of the log was cut off, and name the checkpoint that says so', () => {
    const copy = join(deployed, 'tampered')
    mkdirSync(copy)
    copyFileSync(join(folder, 'vault.sqlite'), join(copy, 'vault.sqlite'))
    tamper(copy, cutTail(seededRandom(7919)))
    const { code, out, err } = verify('tampered', '--checkpoint', 'checkpoint.txt')
    expect(code).toBe(1)
    expect(out).toContain('Damage: ')
    expect(err).toContain('checkpoint.txt is over ')
  })

  it('end with 2, 10 and 11 where the call makes no sense, there is no vault, and it is locked', () => {
    expect(verify('--fast')).toMatchObject({ code: 2, err: expect.stringContaining('--fast is no option') as string })
    expect(verify(join(deployed, 'nothing'))).toMatchObject({ code: 10, err: expect.stringContaining('There is no vault') as string })
    const locked = join(deployed, 'locked')
    mkdirSync(locked)
    copyFileSync(join(folder, 'vault.sqlite'), join(locked, 'vault.sqlite'))
    const holder = new Database(join(locked, 'vault.sqlite'))
    holder.pragma('locking_mode = EXCLUSIVE')
    holder.exec('BEGIN EXCLUSIVE')
    expect(verify('locked')).toMatchObject({ code: 11, err: expect.stringContaining('locked by another process') as string })
    holder.close()
  })
})
