import type { VaultDb } from '#server/database/prepared'
import { stockRows } from '#server/database/unit/queries'

/** An axis as far as a spare for it is concerned. */
export interface Wanting {
  readonly siteId: number
  /** Of the unit that is fitted, else of the one that the current version was read from; null = nobody knows. */
  readonly model: string | null
}

/** Which models lie in stock at which site; those of no site in particular serve all. */
export interface Stock { readonly fits: (axis: Wanting) => boolean }

/** Spares are counted once for all axes that are looked at. */
export function readStock(db: VaultDb): Stock {
  const bySite = new Map<number | null, Set<string>>()
  for (const { siteId, model } of stockRows(db)) bySite.set(siteId, (bySite.get(siteId) ?? new Set()).add(model))
  const has = (siteId: number | null, model: string) => bySite.get(siteId)?.has(model) === true
  return { fits: ({ siteId, model }) => model !== null && (has(siteId, model) || has(null, model)) }
}
