import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { SettingsFile } from '../../shared/settings/types'
import { openWindow, signIn, startBrowser } from '../support/browser'
import { csvFile, inserted, jsonFile, lidPress, readOrFail } from '../support/lid-press'
import { admin, startServer, type TestServer } from '../support/server'
import { downloaded, drop, field, goTo, pick } from '../support/walk'

/*
 * The whole job of a planner, from an empty vault to the kit for a replacement unit, in the order of the day. Each step goes
 * on from what the one before has left in the vault.
 */

const runa = { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', password: 'the second shelf on the left' }
const asta = { name: 'Asta Lindqvist', email: 'asta.lindqvist@larkfield.example', password: 'a jar of plums in october' }

let server: TestServer
let browser: Browser
/** The planner's window, and that of another planner. */
let page: Page
let other: Page

/** What the data sheet of the invented model says, by the labels of the form. */
const plateNumbers = {
  'Stroke': '200', 'Room to the hard stop': '1', 'Decimals shown': '3', 'Highest speed': '500', 'Highest acceleration': '5000', 'Highest press speed': '30',
  'Rated thrust or torque': '640', 'Peak thrust or torque': '1600', 'Least press force': '10', 'Highest press force': '70', 'Longest overload': '1000',
  'Lead': '10', 'Efficiency': '0.9', 'Moving mass': '2.1', 'Inertia of the rotor': '0.35', 'Payload when level': '30', 'Payload when vertical': '12',
  'One count': '0.001', 'Last digit shown': '0.01', 'Repeatability': '0.02', 'Moves at most': '64', 'Select inputs at most': '6', 'Input filter': '2',
  'Brake closes in': '40', 'Brake opens in': '30', 'Brake holds': '900',
}
const plateChoices = {
  'First move': '0', '100 % means': 'rated-thrust', 'Encoder': 'absolute', 'Home offset': 'zero-is-home-plus-offset', 'All inputs off calls': 'first', 'Start signal': 'edge',
  'Inputs': 'p', 'Outputs': 'p', 'Brake fitted': 'yes',
}

const first = lidPress()
const second: SettingsFile = {
  ...lidPress({ exportedAt: '2024-12-04T07:30:00+01:00', setup: { thrustLimit: 45 } }),
  moves: inserted(first.moves, { move: 3, label: 'Hold lid', kind: 'absolute', target: 103, speed: 20, acceleration: 300 }),
}

async function mark(window: Page, number: number, password: string): Promise<Locator> {
  await window.getByRole('button', { name: 'Mark known-good' }).click()
  const dialog = window.getByRole('dialog', { name: `Mark v${number} known-good` })
  await dialog.getByLabel('Your password', { exact: true }).fill(password)
  await dialog.getByRole('button', { name: 'Sign and mark' }).click()
  return dialog
}

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer({ env: { WITNESSMARK_ADMIN_EMAIL: '' }, seeded: false }), startBrowser()])
  page = (await openWindow(browser, server.url)).page
  other = (await openWindow(browser, server.url)).page
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('an empty vault', () => {
  it('is claimed once, at the address that the server printed', async () => {
    const printed = /\/set-up\?token=[\w-]+/.exec(server.output())?.[0] ?? ''
    await page.goto(printed)
    await page.getByLabel('Plant').fill('Larkfield Preserves')
    await page.getByLabel('Your name').fill('Ines Okafor')
    await page.getByLabel('E-mail').fill(admin.email)
    await page.getByLabel('Password', { exact: true }).fill(admin.password)
    await page.getByRole('button', { name: 'Set up' }).click()
    await page.getByRole('heading', { level: 1, name: 'No axis yet. Three steps to begin' }).waitFor()
    expect(await page.getByRole('banner').innerText()).toContain('Larkfield Preserves')

    await other.goto(printed)
    await other.getByLabel('Your name').fill('Somebody Else')
    await other.getByLabel('E-mail').fill('else@larkfield.example')
    await other.getByLabel('Password', { exact: true }).fill('copper kettle under the stairs')
    await other.getByRole('button', { name: 'Set up' }).click()
    expect(await other.getByRole('alert').innerText()).toContain('The vault has its administrator')
  })

  it('the administrator registers people, and what is wrong stands at the field', async () => {
    await goTo(page, 'People')
    for (const person of [runa, asta]) {
      await page.getByRole('button', { name: 'Register a person' }).click()
      const form = page.getByRole('form', { name: 'A new person' })
      await field(form, 'Name').fill(person.name)
      await field(form, 'E-mail').fill(person.email)
      await form.getByLabel('planner: registers, marks known-good').check()
      await field(form, 'A new password').fill('short')
      await form.getByRole('button', { name: 'Register the person' }).click()
      await form.locator('[aria-invalid="true"]').waitFor()
      expect(await field(form, 'A new password').getAttribute('aria-invalid')).toBe('true')
      await field(form, 'A new password').fill(person.password)
      await form.getByRole('button', { name: 'Register the person' }).click()
      await page.getByRole('row', { name: new RegExp(person.name) }).waitFor()
    }
    await page.getByRole('button', { name: /^Ines Okafor/ }).click()
    await page.getByRole('button', { name: 'Sign out' }).click()
    await page.waitForURL('**/sign-in')
  })

  it('tells the planner how to begin', async () => {
    await signIn(page, runa.email, runa.password)
    await page.getByRole('heading', { level: 1, name: 'No axis yet. Three steps to begin' }).waitFor()
    const steps = page.getByRole('list', { name: 'How to begin' }).getByRole('listitem')
    expect(await steps.count()).toBe(3)
    expect(await steps.first().innerText()).toContain('Site, line, machine and its axes by tag')
    await steps.first().getByRole('link', { name: 'Register a machine' }).click()
    await page.getByRole('heading', { level: 1, name: 'Say what stands where' }).waitFor()
  })
})

describe('the plant is registered', () => {
  it('site, line, machine and axis', async () => {
    await page.getByRole('button', { name: 'Register a site' }).click()
    const site = page.getByRole('form', { name: 'A new site' })
    await field(site, 'Name').fill('Larkfield Preserves')
    await field(site, 'Time zone').fill('Europe/Berlin')
    await site.getByRole('button', { name: 'Register the site' }).click()

    await page.getByRole('button', { name: 'Register a line' }).click()
    const line = page.getByRole('form', { name: 'A new line' })
    await field(line, 'Name').fill('Line 1')
    await line.getByRole('button', { name: 'Register the line' }).click()

    await page.getByRole('button', { name: 'Register a machine' }).click()
    const machine = page.getByRole('form', { name: 'A new machine' })
    await field(machine, 'Name').fill('LID-02')
    await machine.getByRole('button', { name: 'Register the machine' }).click()

    await page.getByRole('button', { name: 'Register an axis' }).click()
    const axis = page.getByRole('form', { name: 'A new axis' })
    await field(axis, 'Tag').fill('LID-02.Z')
    await field(axis, 'Role').fill('seat lid')
    await field(axis, 'Kind').selectOption({ label: 'linear: mm' })
    await axis.getByLabel(/^gravity:/).check()
    await axis.getByLabel(/^press:/).check()
    await axis.getByRole('button', { name: 'Register the axis' }).click()
    await page.getByRole('row', { name: /LID-02\.Z seat lid linear gravity, press/ }).waitFor()
  })

  it('a nameplate and two units of the model', async () => {
    await goTo(page, 'Nameplates')
    await page.getByRole('button', { name: 'Register a model' }).click()
    const plate = page.getByRole('form', { name: 'A new nameplate' })
    await field(plate, 'Model').fill('HL40-200V')
    for (const [label, value] of Object.entries(plateNumbers)) await field(plate, label).fill(value)
    for (const [label, value] of Object.entries(plateChoices)) await field(plate, label).selectOption(value)
    await plate.getByRole('button', { name: 'Register the model' }).click()
    await page.getByRole('heading', { level: 1, name: 'HL40-200V' }).waitFor()

    await page.getByRole('link', { name: 'Units' }).click()
    for (const [serial, firmware] of [['HL40-23-00417', '3.12'], ['HL40-24-00817', '3.12'], ['HL40-25-00958', '3.14']] as const) {
      await page.getByRole('button', { name: 'Register a unit' }).click()
      const unit = page.getByRole('form', { name: 'A new unit' })
      await field(unit, 'Serial').fill(serial)
      await field(unit, 'Model').fill('HL40-200V')
      await field(unit, 'Firmware').fill(firmware)
      await unit.getByRole('button', { name: 'Register the unit' }).click()
      await page.getByRole('row', { name: new RegExp(serial) }).waitFor()
    }
  })

  it('the unit is fitted since before its first file', async () => {
    await page.getByRole('link', { name: 'Places' }).click()
    await page.getByRole('button', { name: 'LID-02', exact: true }).click()
    await page.getByRole('row', { name: /LID-02\.Z/ }).getByRole('button', { name: 'unit' }).click()
    await page.getByRole('button', { name: 'Fit a unit' }).click()
    const form = page.getByRole('form', { name: 'Fit a unit at LID-02.Z' })
    await pick(form, /^Unit/, '00417', /HL40-23-00417/)
    await form.getByLabel(/^Sits there since/).fill('2024-11-29T06:00')
    await form.getByRole('button', { name: 'Fit it' }).click()
    await page.getByText(/HL40-23-00417 sits at LID-02\.Z since/).waitFor()
  })
})

describe('what the drive holds comes in', () => {
  const versions = async () => (await server.call('GET', '/api/axes/tag:LID-02.Z/versions', { as: await server.signIn({ email: runa.email, password: runa.password }) })).json as unknown as { items: { id: number, number: number }[] }

  it('a JSON file is read in the browser, axis and checks shown, before anything is sent', async () => {
    await page.getByRole('link', { name: 'Upload' }).click()
    await drop(page, jsonFile('lid-02.z.json', first))
    await page.getByRole('heading', { level: 1, name: '1 file read. 1 new version' }).waitFor()
    await page.getByText('Read in this browser; nothing has been sent.').waitFor()
    const row = page.getByRole('table', { name: 'Files, by axis' }).getByRole('row', { name: /LID-02\.Z/ }).first()
    expect(await row.innerText()).toMatch(/HL40-23-00417[\s\S]*v1, the first of this axis, no known-good yet/)
    expect((await versions()).items).toEqual([])

    await page.getByRole('combobox', { name: 'Occasion' }).selectOption({ label: 'commissioning' })
    await page.getByRole('button', { name: 'Send 1 file' }).click()
    await page.getByRole('link', { name: 'LID-02.Z v1' }).waitFor()
    expect((await versions()).items.map(version => version.number)).toEqual([1])
  })

  it('who brought in the first version may mark it: somebody has to be able to begin', async () => {
    await page.goto('/axes/LID-02.Z/versions/1')
    const dialog = await mark(page, 1, runa.password)
    await dialog.waitFor({ state: 'hidden' })
    await page.getByText('in line with its known-good v1').waitFor()
  })

  it('a rule of the site is made', async () => {
    await goTo(page, 'Rules')
    await page.getByRole('button', { name: 'Make a rule' }).click()
    const form = page.getByRole('form', { name: 'A new rule' })
    await field(form, 'Site').selectOption({ label: 'Larkfield Preserves' })
    await pick(form, /^Field/, 'thrustLimit', /\(thrustLimit\)/)
    await field(form, 'At most').fill('40')
    await field(form, 'Why').fill('Lids crack above 256 N')
    await form.getByRole('button', { name: 'Make the rule' }).click()
    await page.getByRole('heading', { level: 1, name: '1 rule holds' }).waitFor()
    await page.getByRole('row', { name: /at most 40 %/ }).waitFor()
  })

  it('a CSV file with a raised thrust limit and one move more: the stop is seen before it is sent', async () => {
    await page.getByRole('link', { name: 'Upload' }).click()
    await drop(page, csvFile('lid-02.z.csv', second))
    await page.getByRole('heading', { level: 1, name: '1 file read. 1 new version' }).waitFor()
    const table = page.getByRole('table', { name: 'Files, by axis' })
    expect(await table.innerText()).toMatch(/thrust limit[\s\S]*38[\s\S]*to[\s\S]*45/i)
    expect(await table.innerText()).toContain('Moves were renumbered')
    await table.getByText(/Lids crack above 256 N/).waitFor()
    const send = page.getByRole('button', { name: 'Send 1 file' })
    expect(await send.isDisabled()).toBe(true)
    await page.getByLabel('Why, LID-02.Z').fill('New lids with a thicker rim')
    await page.getByLabel(/I have seen the stop on LID-02\.Z/).check()
    await send.click()
    await page.getByRole('link', { name: 'LID-02.Z v2' }).click()
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z v2' }).waitFor()
  })

  it('the changes say that moves 3–7 became 4–8, not that five rows were rewritten', async () => {
    await page.getByText('Compare with another version').click()
    await page.getByRole('button', { name: 'Compare these' }).click()
    await page.waitForURL('**/changes?**')
    await page.getByText('Moves 3–7 became 4–8.').waitFor()
    const changed = page.getByRole('table', { name: 'Changed values by weight' })
    expect(await changed.innerText()).toMatch(/thrust limit[\s\S]*38[\s\S]*45/i)
    expect(await changed.innerText()).toContain('Hold lid')
    expect(await changed.innerText()).not.toContain('Service, down')
  })
})

describe('known-good', () => {
  it('is refused to who brought in the harm value, and the words name the field, the person and the way on', async () => {
    await page.goto('/axes/LID-02.Z/versions/2')
    const dialog = await mark(page, 2, runa.password)
    const words = await dialog.getByRole('alert').innerText()
    expect(words).toMatch(/thrust limit 38 → 45 % was brought in by Runa Haldersen in version 2/i)
    expect(words).toContain('Ask another planner')
    await page.keyboard.press('Escape')
    await dialog.waitFor({ state: 'hidden' })
  })

  it('is refused to anybody while a stop stands against it', async () => {
    await signIn(other, asta.email, asta.password)
    await other.goto('/axes/LID-02.Z/versions/2')
    const dialog = await mark(other, 2, asta.password)
    const words = await dialog.getByRole('alert').innerText()
    expect(words).toContain('Lids crack above 256 N')
    expect(words).toContain('Put the values right at the drive and upload again, correct the nameplate or the rule if they are wrong, or accept the check with a reason.')
    await dialog.getByRole('button', { name: 'Leave it' }).click()
  })

  it('is marked by another planner once the rule holds no more; a wrong password signs nothing', async () => {
    await goTo(other, 'Rules')
    await other.getByRole('row', { name: /at most 40 %/ }).getByRole('button', { name: 'end' }).click()
    const form = other.getByRole('form', { name: /^End the rule/ })
    await field(form, 'Why it holds no more').fill('The new lids bear 320 N, test report 44')
    await form.getByRole('button', { name: 'End the rule' }).click()
    await other.getByRole('heading', { level: 1, name: 'No rule holds' }).waitFor()

    await other.goto('/axes/LID-02.Z/versions/2')
    const dialog = await mark(other, 2, 'not the password of Asta')
    await dialog.getByText('Type the password you sign in with.').waitFor()
    await dialog.getByLabel('Note').fill('Seen at the machine with Tobias')
    await dialog.getByLabel('Your password', { exact: true }).fill(asta.password)
    await dialog.getByRole('button', { name: 'Sign and mark' }).click()
    await dialog.waitFor({ state: 'hidden' })
    await other.getByText('in line with its known-good v2').waitFor()
  })
})

describe('the kit for a replacement unit', () => {
  const knownGood = readOrFail(csvFile('', second).buffer)
  const settingsOf = ({ axisKind, setup, zones, moves, extra }: SettingsFile) => ({ axisKind, setup, zones, moves, extra })
  const without = (setup: SettingsFile['setup'], ...names: string[]) => Object.fromEntries(Object.entries(setup).filter(([name]) => !names.includes(name)))

  async function take(serial: string, form: string): Promise<{ name: string, bytes: Buffer }> {
    await page.goto('/axes/LID-02.Z')
    await page.getByRole('button', { name: 'Take a kit' }).click()
    const dialog = page.getByRole('dialog', { name: 'Take a kit' })
    const button = dialog.getByRole('button', { name: 'Take the kit' })
    expect(await button.isDisabled()).toBe(true)
    expect(await dialog.innerText()).toContain('Safe torque off does not hold a load')
    expect(await dialog.innerText()).toMatch(/left out of the file\s+Nothing, on a unit of the same model and firmware\./)
    await dialog.getByLabel('I have read these, and act by them').check()
    await dialog.getByLabel('Serial of the replacement unit').fill(serial)
    await dialog.getByLabel('Form').selectOption({ label: form })
    const file = await downloaded(page, () => button.click())
    await dialog.getByText(`${file.name} is in your downloads.`, { exact: false }).waitFor()
    return file
  }

  it('as JSON for a spare of the same model and firmware: the known-good, its home offset to be proved at the machine', async () => {
    const { name, bytes } = await take('HL40-24-00817', 'JSON, the settings format')
    expect(name).toBe('LID-02.Z-v2-kit.json')
    const kit = readOrFail(bytes)
    expect(kit.unit).toMatchObject({ serial: 'HL40-24-00817', model: 'HL40-200V', firmware: '3.12' })
    expect(kit.note).toContain('known-good by Asta Lindqvist')
    expect(knownGood.setup.homeOffset).toBe(0.45)
    expect(settingsOf(kit)).toEqual(settingsOf(knownGood))
  })

  it('as CSV for one of another firmware: without the tuning, which is taught there', async () => {
    const { name, bytes } = await take('HL40-25-00958', 'CSV, for a spreadsheet')
    expect(name).toBe('LID-02.Z-v2-kit.csv')
    expect(bytes.toString().split('\r\n')[0]).toBe('section,row,field,value,unit')
    const kit = readOrFail(bytes)
    expect(kit.unit.serial).toBe('HL40-25-00958')
    expect(settingsOf(kit)).toEqual({ ...settingsOf(knownGood), setup: without(knownGood.setup, 'positionGain', 'velocityGain', 'velocityIntegralTime', 'velocityFeedForward') })
  })
})
