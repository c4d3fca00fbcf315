import type { Browser, Page } from 'playwright-core'
import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openWindow, signIn, startBrowser, violations } from '../support/browser'
import { serveDemo, type DemoPlant } from '../support/demo-plant'

/* The auditor who distrusts us: keeps a checkpoint, comes back, and lets the browser and plain Node reckon. */

let demo: DemoPlant
let browser: Browser
let page: Page
const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
const kept = join(folder, 'checkpoint.txt')
const log = join(folder, 'log.jsonl')

beforeAll(async () => {
  [demo, browser] = await Promise.all([serveDemo(), startBrowser()])
  page = (await openWindow(browser, demo.server.url)).page
  await signIn(page, demo.person('auditor').email, demo.person('auditor').password)
  await page.goto('/trail')
  await page.getByRole('heading', { level: 1, name: /entries/ }).waitFor()
})
afterAll(async () => {
  await browser?.close()
  await demo?.stop()
  rmSync(folder, { recursive: true, force: true })
})

async function taken(button: string, path: string): Promise<string> {
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: button }).click()])
  await download.saveAs(path)
  return readFileSync(path, 'utf8')
}
const told = () => page.locator('.told')

describe('the trail', () => {
  it('gives its checkpoint away, and verifies itself on demand', async () => {
    expect(await taken('Keep the checkpoint', kept)).toMatch(/^witnessmark\/[0-9a-f]{12}\n\d+\n/)
    await page.getByRole('button', { name: 'Verify the whole vault now' }).click()
    await page.getByRole('heading', { level: 1, name: /\d+ entries, found sound/ }).waitFor({ timeout: 60_000 })
  })
  it('is held against the kept checkpoint by the browser itself', async () => {
    await page.getByLabel('A checkpoint that you kept elsewhere').fill(readFileSync(kept, 'utf8'))
    await page.getByRole('button', { name: 'Hold the log against it' }).click()
    await told().getByText(/begins with exactly those \d+: nothing up to there was rewritten/).waitFor()
    expect(await violations(page)).toEqual([])
  })
  it('does not believe a checkpoint that was altered', async () => {
    await page.getByLabel('A checkpoint that you kept elsewhere').fill(readFileSync(kept, 'utf8').replace(/\n(\d+)\n/, (_, size: string) => `\n${Number(size) - 1}\n`))
    await page.getByRole('button', { name: 'Hold the log against it' }).click()
    await told().getByText('text or signature was altered').waitFor()
  })
  it('proves one entry, and hashes the whole log here', async () => {
    await page.getByLabel('Or one entry, by its number').fill('12')
    await page.getByRole('button', { name: 'Prove the entry' }).click()
    await told().getByText(/Entry 12 is in the log of today/).waitFor()
    await page.getByRole('button', { name: 'Read and hash the whole log here' }).click()
    await told().getByText(/entries were read and hashed here; they give the signed root/).waitFor({ timeout: 60_000 })
  })
  it('goes away as a file, which plain Node verifies against the checkpoint, and finds altered', async () => {
    const lines = await taken('Take the whole log', log)
    const verifier = join(folder, 'verify-log.mjs')
    writeFileSync(verifier, await (await fetch(`${demo.server.url}/verify-log.mjs`)).text())
    expect(execFileSync(process.execPath, [verifier, log, '--checkpoint', kept], { encoding: 'utf8' })).toContain('All holds.')
    writeFileSync(log, lines.replace('thrustLimit', 'thrustlimit'))
    const { status, stderr } = spawnSync(process.execPath, [verifier, log, '--checkpoint', kept], { encoding: 'utf8' })
    expect(status).toBe(1)
    expect(stderr).toContain('entries up to there were rewritten')
  })
})
