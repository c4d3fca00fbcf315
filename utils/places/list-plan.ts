import type { Line, Machine, Site, Unit } from '#shared/api/places'
import type { ListRow } from './list'

export const stepKinds = ['site', 'line', 'machine', 'axis', 'unit', 'fitting'] as const
export type StepKind = (typeof stepKinds)[number]

/** One thing to register. `needs` names the body's members that are ids of other things, by their keys. */
export interface Step {
  readonly key: string
  readonly kind: StepKind
  readonly words: string
  readonly body: Readonly<Record<string, unknown>>
  readonly needs: Readonly<Record<string, string>>
}

/** What the vault holds already. */
export interface Known {
  readonly sites: readonly Site[]
  readonly lines: readonly Line[]
  readonly machines: readonly Machine[]
  readonly axes: readonly { readonly id: number, readonly tag: string, readonly serial: string | null }[]
  readonly units: readonly Pick<Unit, 'id' | 'serial' | 'channel' | 'axis'>[]
}
export interface Plan {
  readonly steps: readonly Step[]
  /** Ids of what is there already, by key. */
  readonly ids: ReadonlyMap<string, number>
  readonly notes: readonly { readonly at: number, readonly message: string }[]
}

const key = (...parts: readonly (string | number)[]) => parts.join(' › ').toLowerCase()
const siteKey = (row: ListRow) => key('site', row.site)
const lineKey = (row: ListRow) => key('line', row.site, row.line)
const machineKey = (row: ListRow) => key('machine', row.site, row.line, row.machine)
const axisKey = (tag: string) => key('axis', tag)
const unitKey = (serial: string, channel: unknown) => key('unit', serial, channel === undefined || channel === null ? '' : String(channel))

function knownIds(known: Known): Map<string, number> {
  const nameOf = (id: number) => known.sites.find(site => site.id === id)?.name ?? ''
  const lineOf = (id: number) => known.lines.find(line => line.id === id)
  return new Map([
    ...known.sites.map(site => [key('site', site.name), site.id] as const),
    ...known.lines.map(line => [key('line', nameOf(line.siteId), line.name), line.id] as const),
    ...known.machines.map((machine) => {
      const line = lineOf(machine.lineId)
      return [key('machine', nameOf(line?.siteId ?? 0), line?.name ?? '', machine.name), machine.id] as const
    }),
    ...known.axes.map(axis => [axisKey(axis.tag), axis.id] as const),
    ...known.units.map(unit => [unitKey(unit.serial, unit.channel), unit.id] as const),
  ])
}

const filled = (body: Readonly<Record<string, unknown>>) => Object.fromEntries(Object.entries(body).filter(([, value]) => value !== '' && value !== undefined))

/**
 * What has to be registered for the list, in the order in which it must be done; what is there already is used, never
 * changed. `timeZone` is that of new sites, `since` when the units of the list sit where they sit.
 */
export function planList(rows: readonly ListRow[], known: Known, timeZone: string, since: string): Plan {
  const ids = knownIds(known)
  const steps = new Map<string, Step>()
  const notes: { at: number, message: string }[] = []
  const add = (step: Step) => {
    if (!ids.has(step.key) && !steps.has(step.key)) steps.set(step.key, step)
  }
  for (const row of rows) {
    add({ key: siteKey(row), kind: 'site', words: row.site, body: { name: row.site, timeZone }, needs: {} })
    add({ key: lineKey(row), kind: 'line', words: row.line, body: { name: row.line }, needs: { siteId: siteKey(row) } })
    add({ key: machineKey(row), kind: 'machine', words: row.machine, body: { name: row.machine }, needs: { lineId: lineKey(row) } })
    const there = ids.has(axisKey(row.axis.tag))
    if (there) notes.push({ at: row.at, message: `${row.axis.tag} is registered already and stays as it is` })
    add({ key: axisKey(row.axis.tag), kind: 'axis', words: row.axis.tag, body: filled(row.axis), needs: { machineId: machineKey(row) } })
    if (!row.unit) continue
    const { serial, channel } = row.unit
    const sits = known.units.find(unit => unitKey(unit.serial, unit.channel) === unitKey(serial, channel))?.axis
    const taken = known.axes.find(axis => axisKey(axis.tag) === axisKey(row.axis.tag))?.serial
    if (sits || taken) {
      if (sits?.tag.toLowerCase() !== row.axis.tag.toLowerCase()) notes.push({ at: row.at, message: sits ? `${serial} sits at ${sits.tag}; fit it by hand` : `${taken} sits at ${row.axis.tag}; take it out by hand` })
      continue
    }
    add({ key: unitKey(serial, channel), kind: 'unit', words: serial, body: filled(row.unit), needs: { siteId: siteKey(row) } })
    add({ key: key('fitting', row.axis.tag), kind: 'fitting', words: `${serial} at ${row.axis.tag}`, body: { at: since }, needs: { axisId: axisKey(row.axis.tag), unitId: unitKey(serial, channel) } })
  }
  const ordered = stepKinds.flatMap(kind => [...steps.values()].filter(step => step.kind === kind))
  return { steps: ordered, ids, notes }
}

const nouns: Readonly<Record<StepKind, readonly [string, string]>> = { site: ['site', 'sites'], line: ['line', 'lines'], machine: ['machine', 'machines'], axis: ['axis', 'axes'], unit: ['unit', 'units'], fitting: ['fitting', 'fittings'] }

/** “1 line, 2 machines, 12 axes, 12 units, 12 fittings”. */
export function planInWords(steps: readonly Step[]): string {
  return stepKinds.map((kind) => {
    const count = steps.filter(step => step.kind === kind).length
    return count === 0 ? '' : `${count} ${nouns[kind][count === 1 ? 0 : 1]}`
  }).filter(words => words !== '').join(', ')
}

/** The body with its ids put in; undefined while one of the things it needs is not there. */
export function bodyOfStep(step: Step, ids: ReadonlyMap<string, number>): Record<string, unknown> | undefined {
  const body: Record<string, unknown> = { ...step.body }
  for (const [member, wanted] of Object.entries(step.needs)) {
    const id = ids.get(wanted)
    if (id === undefined) return undefined
    body[member] = id
  }
  return body
}
