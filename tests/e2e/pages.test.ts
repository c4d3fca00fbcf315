import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { desk, openWindow, phone, picture, sidewaysScroll, signIn, startBrowser, themes, violations, type Theme } from '../support/browser'
import { serveDemo, type DemoPlant } from '../support/demo-plant'
import { jsonFile, lidPress } from '../support/lid-press'
import { sourceFiles } from '../support/source-tree'
import { arrive, drop, watchTrouble, type Trouble } from '../support/walk'

/* Every page on the invented plant: by day and by night, on a desk and on a phone, to be read and to be worked by all. */

let demo: DemoPlant
let browser: Browser
const windows = new Map<string, { page: Page, trouble: Trouble }>()

interface Visit { readonly file: string, readonly address: () => string | Promise<string>, readonly ready: RegExp, readonly as?: 'planner' | 'admin' | 'nobody' }

const idOf = async (path: string, wanted: (item: Record<string, unknown>) => boolean): Promise<number> => {
  const { email, password } = demo.person('planner')
  const { json } = await demo.server.call('GET', path, { as: await demo.server.signIn({ email, password }) })
  return (json as unknown as { items: ({ id: number } & Record<string, unknown>)[] }).items.find(wanted)?.id ?? 0
}
const versions = (tag: string, number: number) => idOf(`/api/axes/tag:${tag}/versions`, item => item.number === number)

/** A swap of the demo plant, begun once by its technician. */
let begunSwap: Promise<number> | undefined
async function beginSwap(): Promise<number> {
  const axisId = await idOf('/api/axes?limit=200', item => item.tag === 'LID-05.Z')
  const { email, password } = demo.person('technician')
  const { json } = await demo.server.call('POST', '/api/swaps', { as: await demo.server.signIn({ email, password }), body: { axisId, replaced: 'unit', failure: 'encoder fault' } })
  return (json as unknown as { id: number }).id
}
const swapAt = () => begunSwap ??= beginSwap()

const visits: readonly Visit[] = [
  { file: 'pages/index.vue', address: () => '/', ready: /axes could not be restored tonight/ },
  { file: 'pages/axes/[tag]/label.vue', address: () => '/axes/LID-02.Z/label', ready: /Label for LID-02\.Z/ },
  { file: 'pages/axes/[tag]/index.vue', address: () => '/axes/LID-02.Z', ready: /LID-02\.Z/ },
  { file: 'pages/axes/[tag]/versions/[n].vue', address: () => '/axes/LID-03.Z/versions/2', ready: /LID-03\.Z v2/ },
  { file: 'pages/changes.vue', address: async () => `/changes?a=${await versions('LID-03.Z', 1)}&b=${await versions('LID-03.Z', 2)}`, ready: /LID-03\.Z/ },
  { file: 'pages/changes.vue', address: () => '/changes', ready: /Changes/ },
  { file: 'pages/machines/[id].vue', address: async () => `/machines/${await idOf('/api/machines', item => item.name === 'LID-02')}`, ready: /LID-02/ },
  { file: 'pages/upload.vue', address: () => '/upload', ready: /Upload what the drives hold/ },
  { file: 'pages/swaps/index.vue', address: async () => `/swaps?with=${await swapAt()}`, ready: /not released/ },
  { file: 'pages/swaps/[id].vue', address: async () => `/swaps/${await swapAt()}`, ready: /LID-05\.Z/ },
  { file: 'pages/tray.vue', address: () => '/tray', ready: /files? waits? in the tray/ },
  { file: 'pages/units.vue', address: () => '/units', ready: /\d+ units?, \d+ spares?|Units and spares/ },
  { file: 'pages/places.vue', address: async () => `/places?site=1&machine=${await idOf('/api/machines', item => item.name === 'LID-02')}`, ready: /LID-02, / },
  { file: 'pages/nameplates/index.vue', address: () => '/nameplates', ready: /\d+ nameplates/ },
  { file: 'pages/nameplates/[id].vue', address: async () => `/nameplates/${await idOf('/api/nameplates', item => item.model === 'HL40-200V')}`, ready: /HL40-200V/ },
  { file: 'pages/rules.vue', address: () => '/rules', ready: /rules? holds?/ },
  { file: 'pages/format.vue', address: () => '/format', ready: /The settings file/ },
  { file: 'pages/interface.vue', address: () => '/interface', ready: /\d+ calls/ },
  { file: 'pages/help.vue', address: () => '/help#target-inside', ready: /\d+ rules judge an axis/ },
  { file: 'pages/people.vue', address: () => '/people', ready: /\d+ people/, as: 'admin' },
  { file: 'pages/findings/index.vue', address: () => '/findings', ready: /findings? to be explained/ },
  { file: 'pages/findings/[id].vue', address: async () => `/findings/${await idOf('/api/findings?axis=tag:LID-03.Z', item => item.cause === 'watched-change')}`, ready: /^LID-03\.Z thrust limit 38 → 55 %/ },
  { file: 'pages/history.vue', address: () => '/history?field=thrustLimit&axis=LID-03.Z', ready: /^LID-03\.Z: \d+ changes?\./ },
  { file: 'pages/reports.vue', address: async () => `/reports?place=machine:${await idOf('/api/machines', item => item.name === 'LID-02')}`, ready: /Audit reports/ },
  { file: 'pages/planned.vue', address: () => '/planned', ready: /announced/ },
  { file: 'pages/trail.vue', address: () => '/trail', ready: /\d+ entries, found sound/ },
  { file: 'pages/letters.vue', address: () => '/letters', ready: /letters? waits?|No letter waits/, as: 'admin' },
  { file: 'pages/me.vue', address: () => '/me', ready: /My letters/ },
  { file: 'pages/sign-in.vue', address: () => '/sign-in', ready: /Witnessmark/, as: 'nobody' },
  { file: 'pages/set-up.vue', address: () => '/set-up?token=none', ready: /A new vault/, as: 'nobody' },
]

async function windowOf(as: 'planner' | 'admin' | 'nobody'): Promise<{ page: Page, trouble: Trouble }> {
  const open = windows.get(as)
  if (open) return open
  const { page } = await openWindow(browser, demo.server.url)
  if (as !== 'nobody') await signIn(page, demo.person(as).email, demo.person(as).password)
  const made = { page, trouble: await watchTrouble(page) }
  windows.set(as, made)
  return made
}

/** Draws the page for that light, as a device does that says so. */
async function lightUp(page: Page, theme: Theme): Promise<void> {
  const value = theme === 'night' ? 'dark' : 'light'
  await page.emulateMedia({ colorScheme: value })
  await page.locator(`html[data-theme="${value}"]`).waitFor()
}

beforeAll(async () => {
  [demo, browser] = await Promise.all([serveDemo(), startBrowser()])
})
afterAll(async () => {
  await browser?.close()
  await demo?.stop()
})

describe('every page', () => {
  it('is on the list of visits', () => {
    expect([...new Set(visits.map(visit => visit.file))].sort()).toEqual(sourceFiles('pages').sort())
  })

  for (const { file, address, ready, as = 'planner' } of visits) {
    it(`${file.slice(6)}, ${ready.source}`, async () => {
      const { page, trouble } = await windowOf(as)
      const to = await address()
      trouble.forget()
      const found: string[] = []
      for (const [name, size] of [['desk', desk], ['phone', phone]] as const) {
        await page.setViewportSize(size)
        await arrive(page, to, ready)
        for (const theme of themes) {
          await lightUp(page, theme)
          found.push(...(await violations(page, theme === 'day' ? 'all' : 'colours')).map(violation => `${name}, ${theme}: ${violation}`))
          await picture(page, `${to.split('?')[0]?.replaceAll(/\W+/g, '-')}-${name}-${theme}`)
        }
        const widths = name === 'desk' ? [desk.width] : [phone.width, 320]
        for (const width of widths) {
          await page.setViewportSize({ width, height: size.height })
          const pixels = await sidewaysScroll(page)
          if (pixels > 0) found.push(`${width} px wide: scrolls ${pixels} px sideways`)
        }
      }
      expect([...found, ...trouble.told()]).toEqual([])
    })
  }

  it('an address that there is not says so, and leads to the board', async () => {
    const { page } = await windowOf('planner')
    await page.setViewportSize(desk)
    await page.goto('/no-such-page')
    await page.getByRole('heading', { level: 1, name: 'There is no page at this address' }).waitFor()
    expect(await violations(page)).toEqual([])
    await page.getByRole('button', { name: 'Open the board' }).click()
    await page.getByRole('heading', { level: 1, name: /axes could not be restored tonight/ }).waitFor()
  })
})

interface Opened { readonly what: string, readonly file: string, readonly as?: 'planner' | 'admin', readonly open: (page: Page) => Promise<unknown>, /** Where what lies beneath cannot be hit. */ readonly within?: string }
const press = (page: Page, name: string | RegExp) => page.getByRole('button', { name }).first().click()
const unfold = async (page: Page) => page.locator('details').evaluateAll(all => all.forEach((one) => { (one as HTMLDetailsElement).open = true }))

const opened: readonly Opened[] = [
  { what: 'the kit', file: 'pages/axes/[tag]/index.vue', open: page => press(page, 'Take a kit') },
  { what: 'the mark', file: 'pages/axes/[tag]/versions/[n].vue', open: page => press(page, 'Mark known-good') },
  { what: 'setting aside', file: 'pages/axes/[tag]/versions/[n].vue', open: page => press(page, 'Set aside') },
  { what: 'all that is folded on a version', file: 'pages/axes/[tag]/versions/[n].vue', open: unfold },
  { what: 'all that is folded on changes', file: 'pages/changes.vue', open: unfold },
  { what: 'a new axis with nothing said', file: 'pages/places.vue', open: async (page) => {
    await press(page, 'Register an axis')
    await press(page, 'Register the axis')
  } },
  { what: 'which unit sits there', file: 'pages/places.vue', open: async (page) => {
    await press(page, 'unit')
    await press(page, /^Take .* out$/)
  } },
  { what: 'a nameplate being changed', file: 'pages/nameplates/[id].vue', open: page => press(page, 'Change it') },
  { what: 'a new rule with its list of fields', file: 'pages/rules.vue', open: async (page) => {
    await press(page, 'Make a rule')
    await page.getByRole('combobox', { name: /^Field/ }).fill('thrust')
    await page.getByRole('listbox').getByRole('option').first().waitFor()
  } },
  { what: 'an axis to begin a swap at', file: 'pages/swaps/index.vue', open: async (page) => {
    await press(page, 'Begin a swap')
    await page.getByLabel('Three characters of the tag').fill('04z')
    await page.getByRole('list', { name: 'Axes found' }).getByRole('button').first().click()
    await page.getByRole('group', { name: /^Which unit sits there/ }).waitFor()
  } },
  { what: 'which unit is truly fitted', file: 'pages/swaps/[id].vue', open: page => press(page, 'Abandon the swap') },
  { what: 'what the old unit tells', file: 'pages/swaps/[id].vue', open: page => press(page, /^Look at it ?: Which axis/) },
  { what: 'where a file of the tray belongs', file: 'pages/tray.vue', open: page => press(page, /say where it sits|Say where it belongs/) },
  { what: 'files that were read', file: 'pages/upload.vue', open: async (page) => {
    await drop(page, [jsonFile('known.json', lidPress({ serial: 'HL40-23-00392', setup: { thrustLimit: 70 } })), jsonFile('stranger.json', lidPress({ serial: 'HL40-26-09999' })), { name: 'torn.json', mimeType: 'application/json', buffer: Buffer.from('{') }])
    await page.getByRole('heading', { level: 1, name: /^3 files read/ }).waitFor()
  } },
  { what: 'a new person with nothing said', file: 'pages/people.vue', as: 'admin', open: async (page) => {
    await press(page, 'Register a person')
    await press(page, 'Register the person')
  } },
  { what: 'an explanation with nothing said', file: 'pages/findings/[id].vue', open: async (page) => {
    await press(page, 'Explain it')
    await press(page, 'Put it under my name')
  } },
  { what: 'axes that were not read', file: 'pages/history.vue', open: async (page) => {
    await press(page, /^Which axes/)
    await page.getByRole('heading', { name: 'Not read in that time' }).waitFor()
  } },
  { what: 'a change being announced', file: 'pages/planned.vue', open: async (page) => {
    await press(page, 'Announce a change')
    await press(page, 'Announce it')
  } },
  { what: 'the way to watch an axis', file: 'pages/me.vue', open: page => press(page, 'Watch an axis') },
  { what: 'a new token', file: 'pages/people.vue', as: 'admin', open: page => press(page, 'Make a token') },
  { what: 'who is signed in, or the menu', file: 'pages/format.vue', within: 'header', open: async (page) => {
    const menu = page.getByRole('button', { name: 'Menu' })
    await (await menu.isVisible() ? menu : page.getByRole('button', { name: /^Runa Haldersen/ })).click()
  } },
]

describe('what opens on a page', () => {
  for (const { what, file, as = 'planner', open, within } of opened) {
    it(what, async () => {
      const { page, trouble } = await windowOf(as)
      const { address, ready } = visits.find(visit => visit.file === file)!
      const to = await address()
      trouble.forget()
      const found: string[] = []
      for (const [size, theme] of [[desk, 'day'], [phone, 'night']] as const) {
        await page.setViewportSize(size)
        await lightUp(page, theme)
        await arrive(page, to, ready)
        await open(page)
        found.push(...(await violations(page, 'all', within)).map(violation => `${size.width} px, ${theme}: ${violation}`))
        const pixels = await sidewaysScroll(page)
        if (pixels > 0) found.push(`${size.width} px wide: scrolls ${pixels} px sideways`)
        await picture(page, `${what.replaceAll(/\W+/g, '-')}-${size.width}`)
      }
      expect([...found, ...trouble.told()]).toEqual([])
    })
  }
})
