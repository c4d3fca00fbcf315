import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { UnitState } from '#server/database/unit/table'
import { endFitting, openFitting } from '../units/fittings'

/** From now on `unitId` alone sits at the axis (null: none); a unit that sat there comes out and is `outState` then. */
export function fitAlone(vault: Vault, write: Write, actor: PersonActor, axisId: number, unitId: number | null, outState: Exclude<UnitState, 'fitted'>): void {
  const open = judgingQueries(vault.db).openAtAxis.get({ axisId })
  if (open?.unit.id === unitId) return
  if (open) endFitting(vault, actor, open.fitting.id, { at: write.now, unitState: outState })
  if (unitId !== null) openFitting(vault, actor, { axisId, unitId, at: write.now })
}
