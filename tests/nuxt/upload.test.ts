import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { strToU8 } from 'fflate'
import { getQuery, getRequestHeader, setResponseStatus, type H3Event } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import UploadPage from '~/pages/upload.vue'
import type { JudgingContext } from '#shared/api/uploads'

const contentOf = (thrustLimit: number) => ({ axisKind: 'linear' as const, setup: { thrustLimit }, zones: [], moves: [], extra: {} })
const settings = (serial: string, thrustLimit: number) => JSON.stringify({
  schema: 'witnessmark.axis-settings/1', unit: { serial, model: 'HL40-200V' }, exportedAt: '2026-12-01T08:15:00+01:00', axisKind: 'linear', setup: { thrustLimit },
})
const file = (name: string, text: string) => new File([strToU8(text)], name)

const known: JudgingContext = {
  problem: null, registered: { model: 'HL40-200V', serial: 'S-1' }, axis: { id: 5, tag: 'CAS-01.Z', role: 'lower', axisKind: 'linear', flags: [], watched: [], duty: null, controllerScanMs: null },
  current: { versionId: 80, number: 8, contentHash: 'x', content: contentOf(40), capturedAt: '2026-11-30T08:00:00.000Z', sightings: 3 },
  knownGood: { versionId: 80, number: 8, firmware: null, content: contentOf(40) }, broughtFrom: null, waivers: [], nextNumber: 9, nameplate: null, rules: [{ id: 1, scope: 'site', field: 'thrustLimit', max: 42, reason: 'lids crack above it' }],
}
const unknownSerial: JudgingContext = { ...known, problem: 'serial-unknown', axis: null, current: null, knownGood: null, registered: null, rules: [], nextNumber: 1 }

const received: { query: Record<string, unknown>, key: string | undefined }[] = []
let answer: (event: H3Event) => unknown = () => ({})

mockNuxtImport('useSession', () => () => ({ me: { name: 'Runa Haldersen', roles: ['planner'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }] }, may: () => true, forget: () => {} }))
registerEndpoint('/api/people/names', () => ({ items: [{ id: 2, name: 'Tobias Achterberg' }] }))
registerEndpoint('/api/judging-context', event => getQuery(event).serial === 'S-1' ? known : unknownSerial)
registerEndpoint('/api/uploads', { method: 'POST', handler: (event) => {
  received.push({ query: getQuery(event), key: getRequestHeader(event, 'idempotency-key') })
  return answer(event)
} })

async function pageWith(...files: File[]) {
  const page = await mountSuspended(UploadPage)
  page.getComponent({ name: 'UploadDrop' }).vm.$emit('files', files)
  await vi.waitFor(() => {
    if (page.text().includes('being read')) throw new Error('still reading')
    if (!page.text().includes('What they hold')) throw new Error('no list yet')
  })
  return page
}
const press = async (page: Awaited<ReturnType<typeof pageWith>>, words: string) => {
  await page.findAll('button').find(button => button.text().includes(words))?.trigger('click')
  await flushPromises()
}

describe('the upload page', () => {
  beforeEach(() => {
    useUploads().clear()
    received.length = 0
  })

  it('says how to begin', async () => {
    const page = await mountSuspended(UploadPage)
    expect(page.get('h1').text()).toBe('Upload what the drives hold')
  })

  it('counts what will happen, the stop first, and sends nothing by itself', async () => {
    const page = await pageWith(file('seen.json', settings('S-1', 40)), file('cas-01-z.json', settings('S-1', 44)), file('new.json', settings('S-9', 1)), file('torn.json', '{"schema"'))
    expect(page.get('h1').text()).toBe('4 files read. 1 new version, 1 seen again, 2 for the tray')
    const first = page.findAll('tbody tr')[0]?.text() ?? ''
    expect(first).toContain('CAS-01.Z')
    expect(first).toContain('stop')
    expect(page.text()).toContain('thrust limit')
    expect(received).toEqual([])
  })

  it('waits with Send until the stop was seen, then sends with the words and a key', async () => {
    answer = (event) => {
      setResponseStatus(event, 201)
      return { version: { id: 81, axisTag: 'CAS-01.Z', number: 9 }, findings: [] }
    }
    const page = await pageWith(file('cas-01-z.json', settings('S-1', 44)))
    const send = () => page.findAll('button').find(button => button.text().includes('Send 1 file'))
    expect(send()?.attributes('disabled')).toBeDefined()
    await page.get('input[type="checkbox"]').setValue(true)
    await page.get('.why input').setValue('New crate, WO-4139')
    await send()?.trigger('click')
    await vi.waitFor(() => expect(page.text()).toContain('CAS-01.Z v9'))
    expect(received).toHaveLength(1)
    expect(received[0]?.query).toMatchObject({ reason: 'New crate, WO-4139', occasion: 'routine', name: 'cas-01-z.json' })
    expect(received[0]?.key).toMatch(/^[0-9a-f]{32}$/)
    expect(page.get('h1').text()).toBe('1 file kept')
  })

  it('keeps what was refused and sends it again with the same key', async () => {
    answer = (event) => {
      setResponseStatus(event, 507)
      return { type: 'about:blank', title: 'Disk full', status: 507, detail: 'The disk is full.', code: 'disk-full' }
    }
    const page = await pageWith(file('seen.json', settings('S-1', 40)))
    await press(page, 'Send 1 file')
    await vi.waitFor(() => expect(page.text()).toContain('disk is full'))
    answer = () => ({ sighting: { id: 7, at: '2026-12-01T07:20:00.000Z' }, version: { id: 80, axisTag: 'CAS-01.Z', number: 8 } })
    await press(page, 'Send again what was not stored')
    await vi.waitFor(() => expect(page.text()).toContain('seen again'))
    expect(received[1]?.key).toBe(received[0]?.key)
  })

  it('shows errors by line and column with what was meant, and takes the mended file', async () => {
    const page = await pageWith(file('torn.csv', 'section,row,field,value,unit\nfile,,schema,witnessmark.axis-settings/1,\nfile,,exportedAt,2026-11-30T08:15:00+01:00,\nfile,,axisKind,linear,\nunit,,serial,S-1,\nunit,,model,HL40-200V,\nsetup,,thrustLimt,40,%\n'))
    expect(page.get('.er').text()).toMatch(/line 7, column \d+/)
    expect(page.get('.er').text()).toContain('thrustLimit')
    page.getComponent({ name: 'UploadErrors' }).vm.$emit('mended', file('mended.json', settings('S-1', 40)))
    await vi.waitFor(() => expect(page.get('h1').text()).toBe('1 file read. 1 seen again'))
  })

  it('takes the same bytes once', async () => {
    const page = await pageWith(file('a.json', settings('S-1', 40)), file('b.json', settings('S-1', 40)))
    expect(page.get('h1').text()).toBe('2 files read. 1 seen again, 1 twice in the list')
    expect(page.text()).toContain('not sent: the same bytes as a.json')
  })
})
