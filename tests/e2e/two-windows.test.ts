import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openWindow, signIn, startBrowser } from '../support/browser'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn } from '../support/server-plant'
import { field } from '../support/walk'

/* Two people, or one person twice, at the same thing. */

let server: TestServer
let browser: Browser
let mine: Page
let theirs: Page

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  const plant = await plantOn(server)
  await plant.axis('LID-02.Z', 'HL40-23-00417')
  await plant.post('/api/nameplates', { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 600, maxSpeed: 500 })
  mine = (await openWindow(browser, server.url)).page
  theirs = (await openWindow(browser, server.url)).page
  for (const page of [mine, theirs]) await signIn(page, people.planner.email, admin.password)
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('a nameplate open in two windows', () => {
  it('the second to keep it is told what differs, field by field, and puts its own on top', async () => {
    for (const page of [mine, theirs]) {
      await page.goto('/nameplates')
      await page.getByRole('link', { name: 'HL40-200V' }).click()
      await page.getByRole('button', { name: 'Change it' }).click()
    }
    const [ours, other] = [mine, theirs].map(page => page.getByRole('form', { name: 'A new revision of HL40-200V' })) as [ReturnType<Page['getByRole']>, ReturnType<Page['getByRole']>]
    await field(ours, 'Rated thrust or torque').fill('640')
    await field(ours, 'Lead').fill('10')
    await field(other, 'Rated thrust or torque').fill('620')
    await field(other, 'Highest speed').fill('450')
    await other.getByRole('button', { name: 'Keep as a new revision' }).click()
    await theirs.getByText('Revision 2, linear, 1 registered unit.').waitFor()

    await ours.getByRole('button', { name: 'Keep as a new revision' }).click()
    const conflict = ours.getByRole('alert')
    expect(await conflict.innerText()).toContain('Changed meanwhile by somebody else. Nothing of yours is stored yet.')
    expect(await conflict.getByRole('row', { name: /Rated thrust/ }).innerText()).toMatch(/600\s+620\s+640/)
    await conflict.getByRole('button', { name: 'Put mine on top of theirs' }).click()
    await ours.getByRole('button', { name: 'Keep as a new revision' }).click()
    await mine.getByText('Revision 3, linear, 1 registered unit.').waitFor()

    const { json } = await server.call('GET', '/api/nameplates', { as: await server.signIn('planner') })
    expect((json as unknown as { items: { nameplate: object }[] }).items[0]?.nameplate).toMatchObject({ ratedThrust: 640, maxSpeed: 450, lead: 10 })
  })
})

describe('an axis open in two windows', () => {
  it('the second may take what the first has kept', async () => {
    for (const page of [mine, theirs]) {
      await page.goto('/places')
      await page.getByRole('button', { name: 'Lid press 2', exact: true }).click()
      await page.getByRole('row', { name: /LID-02\.Z/ }).getByRole('button', { name: 'edit' }).click()
    }
    const [ours, other] = [mine, theirs].map(page => page.getByRole('form', { name: 'Edit LID-02.Z' })) as [ReturnType<Page['getByRole']>, ReturnType<Page['getByRole']>]
    await field(ours, 'Role').fill('press lid')
    await field(other, 'Role').fill('seat lid')
    await other.getByRole('button', { name: 'Keep it' }).click()
    await theirs.getByRole('row', { name: /LID-02\.Z seat lid/ }).waitFor()

    await ours.getByRole('button', { name: 'Keep it' }).click()
    await ours.getByRole('alert').getByRole('button', { name: 'Take theirs' }).click()
    expect(await field(ours, 'Role').inputValue()).toBe('seat lid')
    await ours.getByRole('button', { name: 'Keep it' }).click()
    await ours.getByText('Nothing is changed here yet.').waitFor()
  })
})

describe('a session that ended', () => {
  it('signed out in one window: the other is led to sign in, and back to where it was', async () => {
    const second = await mine.context().newPage()
    await second.goto('/units')
    await second.getByRole('heading', { level: 1, name: '1 unit, 0 spares' }).waitFor()
    await mine.goto('/')
    await mine.getByRole('button', { name: /^Runa Haldersen/ }).click()
    await mine.getByRole('button', { name: 'Sign out' }).click()
    await mine.waitForURL('**/sign-in')

    await second.getByLabel('Find by serial, model or place').fill('00417')
    await second.waitForURL(/\/sign-in\?to=%2Funits$/)
    await second.getByLabel('E-mail').fill(people.planner.email)
    await second.getByLabel('Password', { exact: true }).fill(admin.password)
    await second.getByRole('button', { name: 'Sign in' }).click()
    await second.waitForURL('**/units')
    await second.getByRole('row', { name: /HL40-23-00417/ }).waitFor()
    await second.close()
  })

  it('an address of another place is not gone back to', async () => {
    const { page } = await openWindow(browser, server.url)
    await page.goto('/sign-in?to=//elsewhere.example/units')
    await page.getByLabel('E-mail').fill(people.auditor.email)
    await page.getByLabel('Password', { exact: true }).fill(admin.password)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL(`${server.url}/`)
  })

  it('a wrong password is told without saying which of the two was wrong', async () => {
    const { page } = await openWindow(browser, server.url)
    await page.goto('/sign-in')
    const told: string[] = []
    for (const email of [people.auditor.email, 'nobody@larkfield.example']) {
      await page.getByLabel('E-mail').fill(email)
      await page.getByLabel('Password', { exact: true }).fill('certainly not this one')
      await page.getByRole('button', { name: 'Sign in' }).click()
      await page.getByRole('button', { name: 'Sign in', exact: true, disabled: false }).waitFor()
      told.push(await page.getByRole('alert').innerText())
    }
    expect(told[1]).toBe(told[0])
    expect(await page.getByLabel('Password', { exact: true }).inputValue()).toBe('')
  })
})
