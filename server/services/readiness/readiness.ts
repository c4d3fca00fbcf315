import type { Readiness } from '#shared/api/readiness'
import type { AxisListRow } from '#server/database/axis-state/list'
import { lacksOf } from './lacks'
import type { Stock } from './stock'

/** Whether an axis could be restored tonight, and why not. */
export function readinessOf({ axis, state, site, mark, marked, current, unit }: AxisListRow, stock: Stock, now: string): Readiness {
  const lacks = lacksOf({
    tag: axis.tag,
    markedAt: marked && mark?.at ? mark.at : null, knownGoodMonths: site.knownGoodMonths,
    lastHeardAt: state?.lastUploadAt ?? axis.madeAt, uploadEveryHours: axis.uploadEveryHours,
    spare: stock.fits({ axisId: axis.id, axisRev: axis.rev, siteId: site.id, model: unit?.model ?? current?.model ?? null, versionId: marked?.id ?? current?.id ?? null }),
    backups: state?.backups ?? 0, attachmentWanted: site.attachmentWanted,
    labelTag: state?.labelTag ?? null, labelWanted: site.labelWanted,
  }, now)
  return { ready: lacks.length === 0, lacks }
}
