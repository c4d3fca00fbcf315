import { judge } from '#shared/checks/judge'
import type { Judgement } from '#shared/checks/types'
import { Refusal } from '#shared/errors/refusal'
import type { Content, UnitIdentity } from '#shared/settings/types'
import type { CarryCase } from '#shared/swap/carried'
import { fitOf, type FitAnswer } from '#shared/swap/fit'
import { kitOf } from '#shared/swap/kit'
import type { KitContent, SwapSide } from '#shared/swap/types'
import { readContent } from '#server/database/content/queries'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow, VersionRow } from '#server/database/schema'
import type { SwapRow } from '#server/database/swap/table'
import { unitRows } from '#server/database/unit/queries'
import { judgeInputOf, readAgainst } from '../uploads/read-against'
import { versionRow } from '../versions/read-version'
import { waived } from '../waivers/accepted'

/** What a swap brings over, from which unit to which, and how it goes there. */
export interface SwapKitCase {
  readonly place: AxisPlace
  readonly version: VersionRow
  readonly source: Content
  readonly unit: UnitRow
  readonly carry: CarryCase
  readonly kit: KitContent
}

/** The unit that a version was read from, with the firmware it had then. */
export function sideOfVersion(db: VaultDb, version: VersionRow): SwapSide {
  const unit = unitRows(db).byId.get({ id: version.unitId })
  return sideOf(db, unit?.model ?? version.model, version.firmware, version.file.unit.actuatorModel ?? unit?.actuatorModel ?? null)
}

export function sideOfUnit(db: VaultDb, unit: Pick<UnitRow, 'model' | 'firmware' | 'actuatorModel'>): SwapSide {
  return sideOf(db, unit.model, unit.firmware, unit.actuatorModel)
}

function sideOf(db: VaultDb, model: string, firmware: string | null, actuatorModel: string | null): SwapSide {
  const nameplate = judgingQueries(db).nameplate.get({ model })?.nameplate
  return { model, ...(firmware ? { firmware } : {}), ...(actuatorModel ? { actuatorModel } : {}), ...(nameplate ? { nameplate } : {}) }
}

/** What is exchanged, and for an actuator which one it was. */
export type Goes = Pick<SwapRow, 'replaced' | 'putBack' | 'facts'>

/** How the values of a version go to a unit. */
export function carryCase(db: VaultDb, version: VersionRow, unit: Pick<UnitRow, 'id' | 'model' | 'firmware' | 'actuatorModel'>, { replaced, putBack, facts }: Goes): CarryCase {
  const ownValues = version.unitId === unit.id && (replaced !== 'actuator' || putBack)
  const out = sideOfVersion(db, version)
  const { actuatorModel: _now, ...before } = out
  const { actuatorOut } = facts
  return { replaced, ownValues, into: sideOfUnit(db, unit), out: actuatorOut ? { ...before, ...(actuatorOut.model === null ? {} : { actuatorModel: actuatorOut.model }) } : out }
}

export function kitCase(db: VaultDb, place: AxisPlace, version: VersionRow, unit: UnitRow, goes: Goes): SwapKitCase {
  const source = readContent(db, version.contentId)
  const carry = carryCase(db, version, unit, goes)
  return { place, version, source, unit, carry, kit: kitOf(source, carry) }
}

/** Of a swap that has a unit in and something to restore; else null. */
export function kitCaseOf(db: VaultDb, swap: SwapRow): SwapKitCase | null {
  const unit = swap.unitInId === null ? undefined : unitRows(db).byId.get({ id: swap.unitInId })
  return unit && swap.sourceVersionId !== null ? kitCase(db, placeOf(db, swap.axisId), versionRow(db, swap.sourceVersionId), unit, swap) : null
}

export function placeOf(db: VaultDb, axisId: number): AxisPlace {
  const place = judgingQueries(db).axis.get({ id: axisId })
  if (!place) throw new Refusal('not-found', 'There is no such axis.')
  return place
}

/** The kit judged on the new unit by all rules of today; the step from the old values is judged with it. */
export function judgeKit(db: VaultDb, { place, source, unit, kit }: SwapKitCase): Judgement {
  const identity: Pick<UnitIdentity, 'model' | 'firmware'> = { model: unit.model, ...(unit.firmware === null ? {} : { firmware: unit.firmware }) }
  return judge(judgeInputOf(readAgainst(db, place, unit), kit.content, identity, { content: source }))
}

/** Whether the unit fits: by both nameplates, the content, and the stops that no waiver of the axis covers. */
export function fitCase(db: VaultDb, goes: SwapKitCase, judgement: Judgement, now: string): FitAnswer {
  const { place, kit, carry } = goes
  const checks = waived(db, place.axis.id, judgement, () => kit.content, now).judgement.results
  const { state } = goes.unit
  return fitOf({ ...carry, axis: place.axis, kit, checks, state: state === 'fitted' || carry.ownValues ? 'spare' : state })
}
