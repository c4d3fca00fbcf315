import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Role } from '../../shared/api/common'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { AxisFlag, AxisKind } from '../../shared/settings/types'
import type { PersonActor, TokenActor } from '../../server/database/actor'
import { openVault, type Vault } from '../../server/database/client'
import { inserter } from '../../server/database/inserter'
import { axis, fitting, line, machine, nameplateRevision, person, site, token, unit } from '../../server/database/schema'

/*
 * A small invented plant in a real file, straight into the tables: what tests of the vault's own services stand on.
 */

export const start = Date.parse('2026-03-01T06:00:00.000Z')
export const minute = 60_000
export const hour = 60 * minute
export const day = 24 * hour
export const iso = (milliseconds: number) => new Date(milliseconds).toISOString()

export interface Plant {
  readonly vault: Vault
  /** The vault's clock, in milliseconds; tests move it. */
  now: number
  readonly siteId: number
  readonly machineId: number
  readonly person: (name: string, roles?: Role[], sites?: number[]) => PersonActor
  readonly token: (name: string, owner: PersonActor, sites?: number[]) => TokenActor
  readonly axis: (tag: string, options?: { machineId?: number, kind?: AxisKind, flags?: AxisFlag[], uploadEveryHours?: number }) => number
  readonly unit: (serial: string, options?: { model?: string, firmware?: string, channel?: number, siteId?: number }) => number
  readonly fit: (axisId: number, unitId: number, from: number, to?: number) => number
  readonly nameplate: (nameplate: Nameplate) => number
  readonly machineAt: (siteName: string) => { siteId: number, machineId: number }
  readonly rows: () => Record<string, number>
  readonly close: () => void
}

export function openPlant(options: { fourEyes?: boolean, watched?: string[] } = {}): Plant {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
  const plant = { now: start }
  const vault = openVault(folder, { clock: () => plant.now, scryptCost: 1024 })
  const { db } = vault
  const madeAt = iso(start - 700 * day)
  const insertPerson = inserter(db, person)
  const machineAt = (siteName: string, terms: { fourEyes?: boolean, watched?: string[] } = {}) => {
    const siteId = inserter(db, site)({ rev: 1, name: siteName, timeZone: 'Europe/Berlin', fourEyes: terms.fourEyes ?? true, releaseHours: 24, knownGoodMonths: 24, watched: terms.watched ?? [], madeAt, attachmentWanted: false, labelWanted: true, paper: 'A4' })
    const lineId = inserter(db, line)({ rev: 1, siteId, name: 'Jars', madeAt })
    return { siteId, machineId: inserter(db, machine)({ rev: 1, lineId, name: 'Lid press 1', madeAt }) }
  }
  const first = machineAt('Larkfield', options)
  return Object.assign(plant, {
    vault, ...first, machineAt,
    person: (name: string, roles: Role[] = ['planner'], sites: number[] = []): PersonActor => {
      const id = insertPerson({ rev: 1, name, email: `${name.toLowerCase().replaceAll(' ', '.')}@larkfield.example`, roles, siteIds: sites, shared: false, madeAt })
      return { kind: 'person', id, name, roles, sites: sites.length === 0 ? null : sites, shared: false, session: null, peer: '192.0.2.7' }
    },
    token: (name: string, owner: PersonActor, sites: number[] = []): TokenActor => {
      const id = inserter(db, token)({ name, secretHash: name.padEnd(64, '0').slice(0, 64), scopes: ['upload'], siteIds: sites, ownerId: owner.id, madeBy: owner.id, madeAt, endsAt: iso(start + 300 * day) })
      return { kind: 'token', id, name, ownerId: owner.id, scopes: ['upload'], sites: sites.length === 0 ? null : sites, peer: '192.0.2.8' }
    },
    axis: (tag: string, { machineId = first.machineId, kind = 'linear' as AxisKind, flags = [] as AxisFlag[], uploadEveryHours }: { machineId?: number, kind?: AxisKind, flags?: AxisFlag[], uploadEveryHours?: number } = {}) =>
      inserter(db, axis)({ rev: 1, machineId, tag, axisKind: kind, role: 'lid press', flags, bus: '', uploadEveryHours: uploadEveryHours ?? null, madeAt }),
    unit: (serial: string, { model = 'HL40-200V', firmware, channel, siteId }: { model?: string, firmware?: string, channel?: number, siteId?: number } = {}) =>
      inserter(db, unit)({ rev: 1, serial, channel: channel ?? null, model, firmware: firmware ?? null, location: '', state: 'spare', siteId: siteId ?? null, madeAt }),
    fit: (axisId: number, unitId: number, from: number, to?: number) =>
      inserter(db, fitting)({ axisId, unitId, fromAt: iso(from), toAt: to === undefined ? null : iso(to), madeAt }),
    nameplate: (nameplate: Nameplate) => inserter(db, nameplateRevision)({ model: nameplate.model, revision: 1, nameplate, madeAt, madeBy: insertedMaker(db) }),
    rows: () => countRows(vault),
    close: () => {
      vault.close()
      rmSync(folder, { recursive: true })
    },
  })
}

/** The plant as most services are tried on: a planner, a technician, and the axis LID-02.Z with SN-0001 in for 300 days, or with `unit: null` none. */
export function openLidPlant({ uploadEveryHours, unit = {} }: { uploadEveryHours?: number, unit?: { firmware?: string } | null } = {}) {
  const plant = openPlant()
  const runa = plant.person('Runa Haldersen')
  const tobias = plant.person('Tobias Achterberg', ['technician'])
  const axisId = plant.axis('LID-02.Z', uploadEveryHours === undefined ? {} : { uploadEveryHours })
  if (unit) plant.fit(axisId, plant.unit('SN-0001', unit), start - 300 * day)
  return { plant, runa, tobias, axisId }
}

function insertedMaker(db: Vault['db']): number {
  const known = db.select({ id: person.id }).from(person).limit(1).get()
  return known?.id ?? inserter(db, person)({ rev: 1, name: 'Vault', email: 'vault@larkfield.example', roles: ['planner'], siteIds: [], shared: false, madeAt: iso(start) })
}

function countRows({ sqlite }: Vault): Record<string, number> {
  const tables = sqlite.prepare(`SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%'`).pluck().all() as string[]
  return Object.fromEntries(tables.map(table => [table, sqlite.prepare(`SELECT count(*) FROM "${table}"`).pluck().get() as number]))
}

export interface FileParts {
  readonly serial?: string
  readonly channel?: number
  readonly model?: string
  readonly firmware?: string
  readonly exportedAt?: string
  readonly axisKind?: AxisKind
  readonly setup?: object
  readonly moves?: readonly object[]
  readonly zones?: readonly object[]
  readonly extra?: object
  readonly readings?: object
}

/** Bytes of a settings file as a drive would give them out. */
export function settingsFile(parts: FileParts = {}): Buffer {
  const { serial = 'SN-0001', channel, model = 'HL40-200V', firmware = '2.4', exportedAt = iso(start), axisKind = 'linear', setup = {}, moves = [], zones = [], extra = {}, readings = {} } = parts
  return Buffer.from(JSON.stringify({ schema: 'witnessmark.axis-settings/1', unit: { serial, channel, model, firmware }, exportedAt, axisKind, setup, moves, zones, extra, readings }), 'utf8')
}
