import type { Readiness } from '#shared/api/readiness'
import { onceFor } from '#shared/motion/once'
import type { AxisListRow } from '#server/database/axis-state/list'
import { lacksOf, standsUntil, type ReadinessFacts } from './lacks'
import type { Stock } from './stock'

/** Rows of all axes are kept until the next act, and what is in them does not change. */
const factsOf = onceFor(({ axis, state, site, mark, marked }: AxisListRow): ReadinessFacts => ({
  tag: axis.tag,
  markedAt: marked && mark?.at ? mark.at : null, knownGoodMonths: site.knownGoodMonths,
  lastHeardAt: state?.lastUploadAt ?? axis.madeAt, uploadEveryHours: axis.uploadEveryHours,
  backups: state?.backups ?? 0, attachmentWanted: site.attachmentWanted,
  labelTag: state?.labelTag ?? null, labelWanted: site.labelWanted,
}))

interface Told { readonly readiness: Readiness, readonly spare: boolean, readonly until: string | null }
const told = new WeakMap<AxisListRow, Told>()

/** Whether an axis could be restored tonight, and why not. Said again as it was as long as neither its row nor the day makes it another. */
export function readinessOf(row: AxisListRow, stock: Stock, now: string): Readiness {
  const spare = stock.spareFor(row).fits
  const before = told.get(row)
  if (before?.spare === spare && (before.until === null || now <= before.until)) return before.readiness
  const facts = factsOf(row)
  const lacks = lacksOf(facts, spare, now)
  const readiness = { ready: lacks.length === 0, lacks }
  told.set(row, { readiness, spare, until: standsUntil(facts, now) })
  return readiness
}
