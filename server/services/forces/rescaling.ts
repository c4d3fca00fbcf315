import type { VaultDb } from '#server/database/prepared'
import { swapQueries } from '#server/database/swap/queries'

/** An axis with the unit that percentages were brought to. */
export interface Brought { readonly axisId: number, readonly unitId: number }

/** Whether somebody confirmed by name, in a swap, that the percentages of this axis were worked out for the force base of this unit. */
export function rescalingConfirmed(db: VaultDb, { axisId, unitId }: Brought): boolean {
  return swapQueries(db).broughtTo.all({ axisId, unitId }).some(({ facts }) => facts.forces !== undefined)
}
