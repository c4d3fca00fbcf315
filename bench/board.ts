import { existsSync } from 'node:fs'
import { chromium, type Page } from 'playwright-core'
import type { Board, BoardAxis } from '../shared/api/board'
import { BuiltServer, admin } from './built-server'
import { atMost, type Figure } from './figure'

/*
 * The board of a plant of 10,000 axes: the built application in a real Chromium, the answer to /api/board exchanged on the
 * way for one with so many rows. Scrolled by the wheel, and searched key by key. Told as CPU time of the page's thread, and as
 * elapsed time, which is what a person sees on a quiet machine. Chromium draws without a graphics card. Only frames in which the
 * page has moved are counted: those that it waits through cost nothing and would share the cost of the others.
 * A fast hand moves some 240 px a frame, and that has to fit into one. A screen and more a frame is 60 screens a second, which
 * nobody reads: each frame draws all of its rows anew, and may take two.
 */

const rows = 10_000
const turns = 240
const fast = 240
const hard = 1200
const words = ['lid-02', 'press 17', 'lp-9', 'in line']

/** What the page saw of itself, in milliseconds: how long frames took and the CPU time of one. */
interface Scrolled { readonly frames: number[], readonly cpu: number }

/** The same while it was scrolled fast and hard; from each key to the frame that shows its answer. */
interface Seen { readonly fast: Scrolled, readonly hard: Scrolled, readonly keys: number[], readonly drawn: number, readonly cpuOfKey: number }

/** Figures of scrolling, searching and the first sight of 10,000 rows. */
export async function measureBoard(): Promise<Figure[]> {
  const path = [process.env.CHROMIUM_PATH, '/usr/bin/chromium', '/usr/bin/chromium-browser'].find(each => each && existsSync(each))
  if (!path) throw new Error('There is no Chromium: set CHROMIUM_PATH.')
  const server = new BuiltServer()
  const browser = await chromium.launch({ executablePath: path, args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking'] })
  try {
    await server.start()
    const page = await browser.newPage({ baseURL: server.origin, viewport: { width: 1440, height: 1000 } })
    const { fast, hard, keys, drawn, cpuOfKey } = await seenOf(page)
    return [
      atMost(`board of ${rows} axes, from its answer to its rows on screen`, drawn, 1000, 'ms'),
      atMost(`board of ${rows} axes, CPU a frame while scrolled fast`, fast.cpu, 16.7, 'ms'),
      atMost(`board of ${rows} axes, time of a frame while scrolled fast, p95`, percentile(fast.frames, 95), 34, 'ms'),
      atMost(`board of ${rows} axes, CPU a frame that changes all rows`, hard.cpu, 33.4, 'ms'),
      atMost(`board of ${rows} axes, time of a frame that changes all rows, p95`, percentile(hard.frames, 95), 50, 'ms'),
      atMost(`board of ${rows} axes, CPU a key of a search`, cpuOfKey, 50, 'ms'),
      atMost(`board of ${rows} axes, key of a search to the rows that it leaves, p95`, percentile(keys, 95), 100, 'ms'),
    ]
  }
  finally {
    await browser.close()
    server.stop()
  }
}

async function seenOf(page: Page): Promise<Seen> {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(admin.email)
  await page.getByLabel('Password', { exact: true }).fill(admin.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(url => !url.pathname.startsWith('/sign-in'))
  const answer = JSON.stringify(plant())
  await page.route('**/api/board', route => route.fulfill({ contentType: 'application/json', body: answer }))
  await page.addInitScript(watchRows)
  await page.goto('/')
  await page.locator('tr[data-index="0"]').waitFor()
  const drawn = await page.evaluate(() => {
    const [read] = performance.getEntriesByName(`${location.origin}/api/board`) as PerformanceResourceTiming[]
    return (performance.getEntriesByName('rows')[0]?.startTime ?? NaN) - (read?.responseEnd ?? NaN)
  })
  const cpu = await threadTime(page)
  await page.mouse.move(700, 600)
  await page.evaluate(watchFrames)
  const seen = { drawn, fast: await scrolled(page, cpu, fast), hard: await scrolled(page, cpu, hard) }
  const start = await cpu()
  const keys = await searched(page)
  return { ...seen, keys, cpuOfKey: (await cpu() - start) / keys.length }
}

/* What runs in the page is text, since the loader of this bench would put names of its own into functions. */

/** Marks the first frame that has a row of the table. */
const watchRows = `(function look() {
  requestAnimationFrame(document.querySelector('tr[data-index="0"]') ? () => performance.mark('rows') : look)
})()`

/** Keeps how long each frame took in which the page has moved. */
const watchFrames = `(function (before, top) {
  frameTimes = []
  let moved = false
  requestAnimationFrame(function tick(now) {
    if (moved) frameTimes.push(now - before)
    moved = scrollY !== top
    before = now
    top = scrollY
    requestAnimationFrame(tick)
  })
})(performance.now(), scrollY)`

/** Where the page stands when it has come to a place, or two seconds later. */
const restAt = (place: number) => `new Promise((resolve) => {
  const until = performance.now() + 2000
  requestAnimationFrame(function look(now) {
    if (scrollY === ${place} || now > until) resolve(scrollY)
    else requestAnimationFrame(look)
  })
})`

/** From the next key to the frame after the one that it changes. */
const watchKey = `keyTime = new Promise(resolve => addEventListener('keydown', (event) => {
  requestAnimationFrame(() => requestAnimationFrame(() => resolve(performance.now() - event.timeStamp)))
}, { once: true, capture: true })); true`

/** Reads the CPU milliseconds that the page's thread has spent on tasks: script, style, layout and painting. */
async function threadTime(page: Page): Promise<() => Promise<number>> {
  const session = await page.context().newCDPSession(page)
  await session.send('Performance.enable', { timeDomain: 'threadTicks' })
  return async () => 1000 * ((await session.send('Performance.getMetrics')).metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN)
}

/** Three steps on and one back, so many pixels each. */
async function scrolled(page: Page, cpu: () => Promise<number>, step: number): Promise<Scrolled> {
  await page.evaluate('scrollTo(0, 0); frameTimes = []')
  const start = await cpu()
  for (let turn = 0; turn < turns; turn += 1) await page.mouse.wheel(0, turn % 60 < 45 ? step : -step)
  const to = turns / 2 * step
  const top = await page.evaluate<number>(restAt(to))
  if (top !== to) throw new Error(`The board is at ${top} px instead of ${to}: it ran off, or never moved.`)
  const spent = await cpu() - start
  const times = await page.evaluate<number[]>('frameTimes')
  if (times.length < turns / 4) throw new Error(`The board moved in ${times.length} frames only.`)
  return { frames: times, cpu: spent / times.length }
}

/** Each key by itself, the next one only when the frame of this one is drawn. */
async function searched(page: Page): Promise<number[]> {
  const field = page.getByLabel('Find an axis')
  const times: number[] = []
  for (const text of words) {
    await field.fill('')
    for (const key of text) {
      await page.evaluate(watchKey)
      await field.press(key === ' ' ? 'Space' : key)
      times.push(await page.evaluate<number>('keyTime'))
    }
    const left = await page.locator('[role=status]', { hasText: ' of 10' }).innerText()
    if (left.startsWith('10,000')) throw new Error(`The search for ${text} left every axis: ${left}`)
  }
  return times
}

function percentile(values: readonly number[], part: number): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length * part / 100)] ?? NaN
}

function plant(): Board {
  const at = '2026-11-30T07:15:00.000Z'
  return { asOf: at, plant: 'Larkfield Preserves', axes: Array.from({ length: rows }, (_, index) => axisOf(index, at)), attention: [], pending: 0, log: { entries: 1_000_000 } }
}

/** Four sites, 40 lines, 1,250 machines of eight axes, in every state. */
function axisOf(index: number, at: string): BoardAxis {
  const machine = Math.floor(index / 8)
  const line = Math.floor(machine / 31)
  const status = (['in-line', 'in-line', 'in-line', 'off', 'unmarked', 'never-read'] as const)[index % 6] ?? 'in-line'
  const read = status !== 'never-read'
  return {
    id: index + 1, tag: `LID-${String(machine).padStart(4, '0')}.${'XYZABCUV'[index % 8] ?? 'X'}`, role: ['lid press', 'jar lift', 'label slide', 'turntable'][index % 4] ?? '',
    site: `Larkfield ${line % 4}`, line: `Jar line ${line}`, machine: `Lid press ${machine}`, machineId: machine + 1, timeZone: 'Europe/Copenhagen',
    serial: index % 97 === 0 ? null : `LP-${index}`, model: index % 97 === 0 ? null : ['HL40-200V', 'HR16', 'HL25-100'][index % 3] ?? null,
    status, off: status === 'off' ? { harm: index % 3, motion: 2, text: 1 } : { harm: 0, motion: 0, text: 0 }, sense: status === 'off' ? 'more' : null,
    lacks: [], swap: null, lastUploadAt: read ? at : null, overdueSince: index % 40 === 0 ? at : null,
    knownGood: read && status !== 'unmarked' ? { versionId: index + 1, number: 3, at } : null, current: read ? { versionId: index + 2, number: 4 } : null,
    checks: { stop: index % 50 === 0 ? 1 : 0, warn: index % 9 === 0 ? 2 : 0, note: 0, unknown: 0 },
  }
}
