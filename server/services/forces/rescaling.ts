import type { VaultDb } from '#server/database/prepared'

/** An axis with the unit that percentages were brought to. */
export interface Brought { readonly axisId: number, readonly unitId: number }

/**
 * Whether somebody confirmed by name that the percentages of this axis were worked out for the force base of this unit.
 * Swaps confirm it; until one has, nobody did.
 */
export function rescalingConfirmed(_db: VaultDb, _brought: Brought): boolean {
  return false
}
