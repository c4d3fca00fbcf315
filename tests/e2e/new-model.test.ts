import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { desk, openWindow, phone, picture, signIn, sidewaysScroll, startBrowser, violations } from '../support/browser'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { downloaded, drop, field, goTo } from '../support/walk'

/*
 * A planner who was never here before has a new model, and a list as its drive gives it out: own numbers, decimal commas,
 * other units and factors. Without help it is registered, read, given out again the same, judged, and accepted for a while.
 */

const list = (thrust: string, start = '4,00') => [
  '[KT20 backup]', 'No;Parameter;Value;Unit',
  '1;Serial number;KT20-26-0003;', '2;Firmware;2.0;', '10;Soft limit min;0,00;mm', '11;Soft limit max;148,50;mm', '12;Speed limit;0,400;m/s', `13;Thrust limit;${thrust};‰`, '77;Fan level;3;',
  'Step;Name;Mode;Pos;Vel;Acc', `0;Back;A;${start.replace(',', '')};0,250;2,50`, '1;Push;A;13800;0,180;1,80',
].map(line => `${line}\r\n`).join('')
const file = (name: string, text: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(text) })

let server: TestServer
let browser: Browser
let plant: ServerPlant
let page: Page

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  plant = await plantOn(server)
  await plant.axis('PSH-01.X', 'KT20-26-0003', { model: 'KT20', flags: [] })
  page = (await openWindow(browser, server.url)).page
  await signIn(page, people.planner.email, admin.password)
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

async function looked(name: string): Promise<void> {
  for (const [size, width] of [[desk, 'desk'], [phone, 'phone']] as const) {
    await page.setViewportSize(size)
    expect(await sidewaysScroll(page)).toBe(0)
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme })
      await picture(page, `${name}-${width}-${colorScheme}`)
    }
    expect(await violations(page)).toEqual([])
  }
  await page.emulateMedia({ colorScheme: 'light' })
  await page.setViewportSize(desk)
}
const cell = (section: 'Parameters' | 'Columns of the moves', name: string) => page.getByRole('table', { name: section }).getByLabel(name, { exact: true })

describe('a new model', () => {
  it('is registered with a list of its own, begun from a sample', async () => {
    await goTo(page, 'Nameplates')
    await page.getByRole('button', { name: 'Register a model' }).click()
    const form = page.getByRole('form', { name: 'A new nameplate' })
    await field(form, 'Model').fill('KT20')
    await field(form, 'Stroke').fill('150')
    await field(form, 'Highest speed').fill('400')
    await form.getByLabel('Begin from a sample file of this drive').setInputFiles(file('kt20.csv', list('550')))
    await page.getByText('Fields were guessed from the names in kt20.csv').waitFor()
    expect(await Promise.all([1, 3, 5, 6, 7].map(row => cell('Parameters', `Is the field, row ${row}`).inputValue()))).toEqual(['unit:serial', 'softLimitMin', 'speedLimit', 'thrustLimit', 'extra:77'])
    expect(await Promise.all([5, 6].map(row => cell('Parameters', `Unit, row ${row}`).inputValue()))).toEqual(['m/s', '‰'])
  })

  it('says what is still wrong with the sample, by its lines, until the words and units of the moves are told', async () => {
    await page.getByText('"A" is none of absolute, relative, press.').first().waitFor()
    await looked('entry-table-wrong')
    await cell('Columns of the moves', 'Words, row 3').fill('absolute=A, relative=R, press=P')
    await cell('Columns of the moves', 'One count is, row 4').fill('0.01')
    await cell('Columns of the moves', 'Unit, row 5').fill('m/s')
    await cell('Columns of the moves', 'Digits, row 5').fill('3')
    await cell('Columns of the moves', 'Unit, row 6').fill('m/s²')
    await cell('Columns of the moves', 'Digits, row 6').fill('2')
    for (const [row, digits] of [[3, '2'], [4, '2'], [5, '3'], [6, '0']] as const) await cell('Parameters', `Digits, row ${row}`).fill(digits)
    await page.getByText('kt20.csv reads: 4 setup values, 0 zones, 2 moves.').waitFor()
    expect(await page.getByRole('table', { name: 'Moves of the sample' }).innerText()).toMatch(/138[\s\S]*180[\s\S]*1,?800/)
    await looked('entry-table-reads')
    await page.getByRole('button', { name: 'Register the model' }).click()
    await page.getByRole('heading', { level: 1, name: 'KT20' }).waitFor()
    expect(await page.getByRole('table', { name: 'Entry table' }).getByRole('row').count()).toBe(14)
  })
})

describe('a file in the drive’s own layout', () => {
  const versions = async () => (await server.call('GET', '/api/axes/tag:PSH-01.X/versions', { as: plant.as.planner })).json as unknown as { items: { id: number, number: number }[] }
  async function send(name: string, text: string): Promise<void> {
    await page.getByRole('link', { name: 'Upload', exact: true }).click()
    await drop(page, [file(name, text)])
    await page.getByLabel(/^Read from the drive at/).fill(name === 'first.csv' ? '2026-01-05T08:00' : name === 'second.csv' ? '2026-01-06T08:00' : '2026-01-07T08:00')
    await page.getByRole('button', { name: 'Read it by this entry table' }).click()
    await page.getByRole('heading', { level: 1, name: '1 file read. 1 new version' }).waitFor()
  }
  async function sent(number: number): Promise<void> {
    await page.getByRole('button', { name: 'Send 1 file' }).click()
    await page.getByRole('link', { name: `PSH-01.X v${number}` }).waitFor()
    await page.getByRole('button', { name: 'Begin a new list' }).click()
  }

  it('asks for its model on the upload page and becomes a version', async () => {
    await send('first.csv', list('550'))
    await sent(1)
    const { items } = await versions()
    const one = (await server.call('GET', `/api/versions/${items[0]?.id}`, { as: plant.as.planner })).json as unknown as { content: object, upload: { form: string } }
    expect(one.content).toMatchObject({ setup: { softLimitMax: 148.5, speedLimit: 400, thrustLimit: 55 }, extra: { 77: 3 }, moves: [{ move: 0, label: 'Back', kind: 'absolute', target: 4, speed: 250, acceleration: 2500 }, { move: 1, target: 138 }] })
    expect(one.upload.form).toBe('csv')
  })

  it('comes out again as it went in', async () => {
    await page.goto('/axes/PSH-01.X/versions/1')
    const { name, bytes } = await downloaded(page, () => page.getByRole('link', { name: 'As the drive’s own list' }).click())
    expect(name).toBe('PSH-01.X-v1-list.csv')
    expect(bytes.toString('utf8')).toBe(list('550'))
  })

  it('breaks a new rule: every axis judged again is one list, and the stop is accepted until a day', async () => {
    await plant.post('/api/rules', { scope: 'machine', scopeId: plant.machineId, field: 'thrustLimit', max: 50, reason: 'Cartons crush' })
    await goTo(page, 'Rules')
    await page.getByRole('button', { name: 'Judge every axis again' }).click()
    await page.getByRole('row', { name: /PSH-01\.X v1 0 → 1 .*Cartons crush/ }).getByRole('link').click()
    await page.getByRole('button', { name: 'Accept with a reason' }).first().click()
    const dialog = page.getByRole('dialog', { name: 'Accept with a reason' })
    await dialog.getByLabel('Reason').fill('Stiffer cartons until spring')
    await dialog.getByLabel('Your password', { exact: true }).fill(admin.password)
    await dialog.getByRole('button', { name: 'Sign and accept' }).click()
    await page.getByText('Accepted stop by Runa Haldersen').waitFor()
    await looked('accepted-stop')
  })

  it('shows the accepted stop before it is sent, and a stop again where the value is another', async () => {
    await send('second.csv', list('550', '5,00'))
    await page.getByText(/Accepted until .* by Runa Haldersen: Thrust limit 55 %/).waitFor()
    await looked('upload-accepted')
    await sent(2)
    await send('third.csv', list('600', '5,00'))
    const row = page.getByRole('table', { name: 'Files, by axis' })
    expect(await row.innerText()).toMatch(/Thrust limit 60 % is above the 50 %/)
    expect(await row.innerText()).not.toContain('Accepted until')
    await page.getByLabel('Why, PSH-01.X').fill('Trial with the old cartons')
    await page.getByLabel(/^I have seen the stop on PSH-01\.X: Thrust limit 60 %/).check()
    await sent(3)
    await page.goto('/axes/PSH-01.X/versions/3')
    await page.getByRole('table', { name: 'Stops and warnings' }).getByText(/Thrust limit 60 %/).waitFor()
  })

  it('is told apart from the one before, and the waiver is taken back', async () => {
    const [third, second] = (await versions()).items
    await page.goto(`/changes?a=${second?.id}&b=${third?.id}`)
    await page.getByText('thrust limit').first().waitFor()
    await page.goto('/axes/PSH-01.X/versions/2')
    await page.getByRole('button', { name: 'Accept it no more' }).click()
    const dialog = page.getByRole('dialog', { name: 'Accept it no more' })
    await dialog.getByLabel('Reason').fill('The cartons are back to the old ones')
    await dialog.getByLabel('Your password', { exact: true }).fill(admin.password)
    await dialog.getByRole('button', { name: 'Sign and end it' }).click()
    await page.getByRole('table', { name: 'Stops and warnings' }).getByText(/Thrust limit 55 %/).waitFor()
  })
})
