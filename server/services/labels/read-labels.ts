import type { Label, LabelList } from '#shared/api/labels'
import { Refusal } from '#shared/errors/refusal'
import { readAxisPage, readAxisRow, type AxisListRow } from '#server/database/axis-state/list'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { labelQueries } from '#server/database/label/queries'
import { axisAddress } from '../sheet/kit-sheet'

/** A machine has hardly more; beyond, print them axis by axis. */
const most = 200

/** The label of an axis, or of every axis of its machine in the order of their tags. `origin` is where people reach the vault. */
export function readLabels({ db }: Vault, actor: Actor, axisId: number, ofMachine: boolean, origin: string): LabelList {
  const row = readAxisRow(db, axisId)
  if (!row) throw new Refusal('not-found', 'There is no such axis.')
  const sisters = readAxisPage(db, actor.sites, { machineId: row.machine.id }, 0, most)
  const shown = ofMachine ? sisters.toSorted((a, b) => (a.axis.tag.toLowerCase() < b.axis.tag.toLowerCase() ? -1 : 1)) : [row]
  return { labels: shown.map(each => labelOf(db, each, origin)), machine: { ...row.machine, axes: sisters.length }, timeZone: row.site.timeZone }
}

function labelOf(db: Vault['db'], { axis, machine, line }: AxisListRow, origin: string): Label {
  return {
    axisId: axis.id, tag: axis.tag, role: axis.role, machine: machine.name, line: line.name, falls: axis.flags.includes('gravity'),
    address: axisAddress(origin, axis.tag), printed: labelQueries(db).newest.get({ axisId: axis.id }) ?? null,
  }
}
