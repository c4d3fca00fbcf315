import type { FieldChange } from '#shared/diff/types'
import type { Write } from '#server/database/client'
import type { AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { raiseFinding, type Raised } from './raise'
import { changeLine } from './words'

/*
 * Findings that other services cause: a swap and the verification of the trail know what happened, how it is a finding stands
 * here.
 */

type At = Pick<AxisPlace, 'axis' | 'site'>

/** A read-back that differs from the kit; `changes` weightiest first, against what the kit holds. */
export function raiseReadBack(db: VaultDb, write: Write, { axis, site }: At, { swapId, attempt, versionId, changes }: { swapId: number, attempt: number, versionId: number, changes: readonly FieldChange[] }): Raised {
  const [first] = changes
  const says = `${axis.tag}: read-back ${attempt} differs from the kit${first ? `: ${changeLine(first)}${changes.length > 1 ? ` and ${changes.length - 1} more` : ''}` : ''}`
  return raiseFinding(db, write, {
    cause: 'read-back', causeKey: `swap:${swapId}:attempt:${attempt}`, siteId: site.id, weight: first?.weight ?? 'motion', title: says,
    showings: [{ axisId: axis.id, versionId, says, changes }],
  })
}

/** A swap that goes on with a unit that does not fit; who allowed it by phone has explained nothing yet. `told`: who learns of it from another letter. */
export function raiseUnfit(db: VaultDb, write: Write, { axis, site }: At, { swapId, unitIn, why }: { swapId: number, unitIn: string, why: readonly string[] }, told: () => readonly number[] = () => []): Raised {
  const says = `${axis.tag}: a swap goes on with unit ${unitIn}, which does not fit${why[0] ? `: ${why[0].replace(/\.$/, '')}${why.length > 1 ? ` and ${why.length - 1} more` : ''}` : ''}`
  return raiseFinding(db, write, { cause: 'unfit', causeKey: `swap:${swapId}:unit:${unitIn}`, siteId: site.id, weight: 'harm', title: says, showings: [{ axisId: axis.id, versionId: null, says }], told })
}

/** Damage that a verification found; `record` names the first that is damaged, so that each is one finding until it is closed. */
export function raiseDamage(db: VaultDb, write: Write, { record, says }: { record: string, says: string }): Raised {
  return raiseFinding(db, write, { cause: 'verification', causeKey: `damage:${record}`, siteId: null, weight: 'harm', title: `Verification failed: ${record} ${says}`, showings: [] })
}
