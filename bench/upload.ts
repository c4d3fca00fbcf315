import autocannon from 'autocannon'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { PersonActor } from '../server/database/actor'
import { openVault, type Vault } from '../server/database/client'
import { insertPerson } from '../server/database/person/queries'
import { registerAxis } from '../server/services/places/axes'
import { registerLine } from '../server/services/places/lines'
import { registerMachine } from '../server/services/places/machines'
import { registerSite } from '../server/services/places/sites'
import { openFitting } from '../server/services/units/fittings'
import { registerUnit } from '../server/services/units/units'
import { storeUpload } from '../server/services/uploads/store-upload'
import { BuiltServer } from './built-server'
import { atMost, median, type Figure } from './figure'
import { sampleFile, sampleSerial } from './sample-file'

/*
 * What the way over HTTP adds: CPU time of the built server a request (session, rights, origin, limits, answer included) to
 * that of the same service called in this process, both on a real file with full synchronisation.
 */

const rounds = 5
const uploads = 300

/** In-process CPU milliseconds an upload. */
function inProcess(vault: Vault, actor: PersonActor, from: number): number {
  const before = process.cpuUsage()
  for (let index = 0; index < uploads; index += 1) {
    const stored = storeUpload(vault, actor, { bytes: sampleFile(from + index, new Date().toISOString()), name: null }, {})
    if (stored.outcome !== 'version') throw new Error(stored.outcome)
  }
  const { user, system } = process.cpuUsage(before)
  return (user + system) / 1000 / uploads - makingFile
}

/** What making the file costs in this process, which the server has no part in. */
const makingFile = (() => {
  const before = process.cpuUsage()
  for (let index = 0; index < uploads; index += 1) sampleFile(index, new Date().toISOString())
  const { user, system } = process.cpuUsage(before)
  return (user + system) / 1000 / uploads
})()

/** Server CPU milliseconds an upload, four at a time, no two files the same. */
async function overHttp(server: BuiltServer, cookie: string, from: number): Promise<number> {
  const before = server.cpu()
  let next = from
  const answered = await autocannon({
    url: server.origin, connections: 4, amount: uploads,
    requests: [{
      method: 'POST', path: '/api/uploads', headers: { cookie, 'content-type': 'application/json' },
      setupRequest: (request) => {
        const body = Buffer.from(sampleFile(next, new Date().toISOString()))
        next += 1
        return { ...request, body }
      },
    }],
  })
  const stored = answered.statusCodeStats?.['201']?.count ?? 0
  if (stored !== uploads) throw new Error(`Of ${uploads} uploads ${stored} were stored: ${JSON.stringify(answered.statusCodeStats)}`)
  return (server.cpu() - before) / uploads
}

function smallVault(folder: string): { vault: Vault, actor: PersonActor } {
  const vault = openVault(folder)
  const row = insertPerson(vault.db, { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', roles: ['planner'], siteIds: [], madeAt: vault.now() })
  const actor: PersonActor = { kind: 'person', id: row.id, name: row.name, roles: ['planner'], sites: null, shared: false, session: null, peer: '127.0.0.1' }
  const siteId = registerSite(vault, actor, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }).id
  const lineId = registerLine(vault, actor, { siteId, name: 'Jar line 1' }).id
  const machineId = registerMachine(vault, actor, { lineId, name: 'Lid press 2' }).id
  const axisId = registerAxis(vault, actor, { machineId, tag: 'LID-02.Z', axisKind: 'linear' }).id
  const unitId = registerUnit(vault, actor, { serial: sampleSerial, model: 'HL40-200V' }).id
  openFitting(vault, actor, { axisId, unitId, at: '2020-01-01T00:00:00Z' })
  return { vault, actor }
}

/** Server CPU a request to the same pipeline in process, median of interleaved rounds after one to warm up. */
export async function measureUpload(): Promise<Figure[]> {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-bench-'))
  const server = new BuiltServer()
  const { vault, actor } = smallVault(folder)
  try {
    await server.start()
    const cookie = await server.withAxis(sampleSerial)
    const ratios: number[] = []
    for (let round = 0; round <= rounds; round += 1) {
      const http = await overHttp(server, cookie, round * uploads)
      const direct = inProcess(vault, actor, round * uploads)
      if (round > 0) ratios.push(http / direct)
    }
    return [atMost(`server CPU an upload of ${Math.floor(sampleFile(0).length / 1000)} kB, to the same pipeline in process`, median(ratios), 2)]
  }
  finally {
    vault.close()
    rmSync(folder, { recursive: true })
    server.stop()
  }
}
