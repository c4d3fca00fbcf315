import { Refusal } from '#shared/errors/refusal'
import { seesSite, type PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import type { AxisPlace } from '#server/database/judging/queries'
import type { UnitRow } from '#server/database/schema'
import { unitRows, updateUnit } from '#server/database/unit/queries'
import { registerUnit } from '../units/units'

export interface NamedUnit {
  readonly serial: string
  readonly channel?: number | undefined
  readonly model?: string | undefined
  readonly firmware?: string | undefined
  readonly actuatorSerial?: string | undefined
  readonly actuatorModel?: string | undefined
}

/** The unit of a serial as a swap names it: registered with the model that it says where it is new, and refused where it sits at another axis. */
export function namedUnit(vault: Vault, actor: PersonActor, place: AxisPlace, named: NamedUnit, channel: number | null): UnitRow {
  const { serial, model } = named
  const on = named.channel ?? channel ?? undefined
  const known = unitRows(vault.db).bySerial.get({ serial, channel: on ?? 0 })
  if (!known) return registered(vault, actor, place, { ...named, channel: on })
  if (known.siteId !== null && !seesSite(actor, known.siteId)) throw new Refusal('taken', `A unit ${serial} is registered at another site.`)
  if (model !== undefined && model !== known.model) {
    throw refused('/model', 'other-model', `${known.serial} is registered as ${known.model}, not ${model}. Look at the plate again; a planner corrects the register.`)
  }
  const { axisId, axisTag } = unitRows(vault.db).placed.get({ id: known.id }) ?? { axisId: null, axisTag: null }
  if (axisId !== null && axisId !== place.axis.id) throw new Refusal('fitted', `${known.serial} sits at ${axisTag ?? 'another axis'}. Look at the plate again, or end that fitting first.`)
  return known
}

function registered(vault: Vault, actor: PersonActor, place: AxisPlace, { model, serial, channel, firmware, actuatorSerial, actuatorModel }: NamedUnit): UnitRow {
  if (model === undefined) throw refused('/model', 'serial-unknown', `No unit ${serial} is registered. Look at the plate again; if it is right, say its model too.`)
  const { id } = registerUnit(vault, actor, { serial, model, channel, firmware, actuatorSerial, actuatorModel, siteId: place.site.id })
  return unitRows(vault.db).byId.get({ id }) as UnitRow
}

const refused = (at: string, code: string, message: string) => new Refusal('input', message, { errors: [{ at, code, message }] })

/** What the plate says besides, kept in the register; logged where it changes anything. */
export function keepPlate(vault: Vault, write: Write, unit: UnitRow, plate: Partial<Pick<UnitRow, 'firmware' | 'actuatorSerial' | 'actuatorModel'>>): UnitRow {
  const told = Object.fromEntries(Object.entries(plate).filter(([key, value]) => value !== undefined && value !== unit[key as keyof UnitRow]))
  if (Object.keys(told).length === 0) return unit
  const after = { ...unit, ...told, rev: unit.rev + 1 }
  updateUnit(vault.db, after)
  write.log({ act: 'unit-changed', id: unit.id, state: after })
  return after
}
