import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { HistoryAct, HistoryItem, NotReadAxis } from '../../shared/api/history'
import { startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { pdfText } from '../support/paper'
import { iso, settingsFile } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
let captured = Date.now() - 3_600_000

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
  await plant.axis('LID-01.Z', 'SN-1')
  await plant.axis('LID-02.Z', 'SN-2')
  await send(38)
  await send(55)
  await send(38, '?reason=put back&changedBy=Tobias&allowedBy=Marit')
})
afterAll(() => server.stop())

async function send(thrustLimit: number, query = ''): Promise<void> {
  captured += 60_000
  const { status, text } = await plant.upload(settingsFile({ serial: 'SN-1', exportedAt: iso(captured), setup: { thrustLimit, speedLimit: 500 } }), query)
  if (status !== 201) throw new Error(text)
}
const get = (path: string, as = plant.as.auditor) => server.call('GET', path, { as })
const items = async <Item>(path: string) => ((await get(path)).json as unknown as { items: Item[] }).items

describe('history', () => {
  it('answers who changed it, when, from what to what, why and who allowed it', async () => {
    expect(await items<HistoryItem>('/api/history?field=thrustLimit&axis=tag:lid-01.z')).toMatchObject([
      { tag: 'LID-01.Z', before: 55, after: 38, changedBy: 'Tobias', allowedBy: 'Marit', reason: 'put back', number: 3, baseNumber: 2 },
      { tag: 'LID-01.Z', before: 38, after: 55, changedBy: null, reason: null, findingState: 'open' },
    ])
    expect(await items('/api/history?field=targets')).toEqual([])
    expect(await items('/api/history?field=force-limits&by=nobody')).toHaveLength(1)
    expect(await items('/api/history?field=&axis=&by=')).toHaveLength(2)
  })

  it('pages by its cursor', async () => {
    const first = (await get('/api/history?limit=1')).json as unknown as { items: HistoryItem[], next: string }
    const second = await items<HistoryItem>(`/api/history?limit=1&cursor=${first.next}`)
    expect([first.items[0]?.number, second[0]?.number]).toEqual([3, 2])
  })

  it.each([['/api/history?field=thrust', 422], ['/api/history?axis=tag:NO.X', 404], ['/api/history?what=x', 422], ['/api/history?from=yesterday', 422], ['/api/history/acts', 422]] as const)('%s answers %i', async (path, status) => {
    expect((await get(path)).status).toBe(status)
  })

  it('tells of acts beside settings, and of axes that were not read', async () => {
    const { json: site } = await get(`/api/sites/${plant.siteId}`)
    await server.call('PATCH', `/api/sites/${plant.siteId}`, { as: plant.as.planner, body: { rev: (site as unknown as { rev: number }).rev, watched: ['jogSpeed'] } })
    expect((await items<HistoryAct>('/api/history/acts?kind=settings'))[0]).toMatchObject({ act: 'site-changed', subject: 'Larkfield Preserves', changes: [{ field: 'watched', after: ['jogSpeed'] }] })
    expect((await get('/api/history/acts?kind=people', plant.as.technician)).status).toBe(403)
    expect((await items<NotReadAxis>('/api/history/not-read')).map(({ tag }) => tag)).toEqual(['LID-02.Z'])
    expect((await items<NotReadAxis>('/api/history/not-read?to=2021-01-01T00:00:00Z')).map(({ tag }) => tag)).toEqual(['LID-01.Z', 'LID-02.Z'])
  })

  it('is sent whole as CSV and PDF, with the checkpoint, to planners and auditors', async () => {
    const fetched = async (form: string, as: string) => fetch(`${server.url}/api/history?field=thrustLimit&form=${form}`, { headers: { cookie: as } })
    const csv = await fetched('csv', plant.as.auditor)
    expect([csv.status, csv.headers.get('content-type'), csv.headers.get('content-disposition')]).toEqual([200, 'text/csv; charset=utf-8', expect.stringMatching(/^attachment; filename="history-.*\.csv"/)])
    const text = await csv.text()
    expect(text.match(/LID-01\.Z/g)).toHaveLength(2)
    expect(text).toMatch(/# lines,2\r\n/)
    expect(text).toMatch(/# checkpoint of the log,"[\s\S]+— /)
    const pdf = Buffer.from(await (await fetched('pdf', plant.as.planner)).arrayBuffer())
    expect(pdfText(pdf)).toMatch(/Who changed the thrust limit on every axis[\s\S]*2 changes[\s\S]*page 1 of 1/)
    expect((await fetched('pdf', plant.as.technician)).status).toBe(403)
  })
})
