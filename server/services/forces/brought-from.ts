import type { JudgeInput } from '#shared/checks/types'
import { forceBaseOf } from '#shared/motion/force-base'
import { readContent } from '#server/database/content/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow, VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { rescalingConfirmed } from './rescaling'

/**
 * The percentages that the axis had on the unit before, where that is of another model: whatever still reads the same there may
 * mean another force here. `base` is the version that the judged one follows; later ones on the same unit are held against the
 * unit before as well, as the warning must not go with the next upload.
 */
export function broughtFrom(db: VaultDb, axisId: number, unit: Pick<UnitRow, 'id' | 'model'>, base: VersionRow | null): JudgeInput['broughtFrom'] {
  const before = base && lastOfAnotherUnit(db, base, unit.id)
  const model = before && (unitRows(db).byId.get({ id: before.unitId })?.model ?? before.model)
  if (!before || model === unit.model) return undefined
  const forceBase = forceBaseOf(judgingQueries(db).nameplate.get({ model })?.nameplate)
  return {
    content: readContent(db, before.contentId), rescaled: rescalingConfirmed(db, { axisId, unitId: unit.id }),
    ...(forceBase === undefined ? {} : { forceBase }),
  }
}

function lastOfAnotherUnit(db: VaultDb, base: VersionRow, unitId: number): VersionRow | undefined {
  if (base.unitId !== unitId) return base
  const { axisId, orderAt, number } = base
  return versionQueries(db).ofAnotherUnit.get({ axisId, unitId, at: orderAt, number })
}
