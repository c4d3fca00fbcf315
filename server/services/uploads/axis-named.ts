import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'

/** The axis of an id or of `tag:TAG`; undefined where there is none. */
export function axisNamed(db: VaultDb, ref: string): AxisPlace | undefined {
  const queries = judgingQueries(db)
  return ref.startsWith('tag:') ? queries.axisByTag.get({ tag: ref.slice(4) }) : queries.axis.get({ id: Number(ref) })
}
