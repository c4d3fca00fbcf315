import { mayFall } from '#shared/swap/falls'
import { stepOf, type Progress } from '#shared/swap/steps'
import type { KitContent } from '#shared/swap/types'
import type { AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { swapQueries, type NamedReadBack } from '#server/database/swap/queries'
import type { SwapRow } from '#server/database/swap/table'

/** The fields of a swap that its progress hangs on. */
export type Standing = Pick<SwapRow, 'unitInId' | 'fit' | 'facts'>

/** Read-backs of the unit now in; what was read of one that went out again proves nothing of it. */
export function attemptsOf(db: VaultDb, { id, facts }: Pick<SwapRow, 'id' | 'facts'>): NamedReadBack[] {
  return swapQueries(db).readBacks.all({ swapId: id }).filter(({ readBack }) => readBack.rev > (facts.since?.rev ?? 0))
}

/** The newest of them that was compared. */
export function lastCompared(attempts: readonly NamedReadBack[]): NamedReadBack | undefined {
  return attempts.findLast(({ readBack }) => readBack.versionId !== null)
}

/** The newest that was compared after the last result of the first motion: what the axis was left with. */
export function asLeftOf({ facts }: Pick<SwapRow, 'facts'>, attempts: readonly NamedReadBack[]): NamedReadBack | undefined {
  const { firstMotion } = facts
  return firstMotion && lastCompared(attempts.filter(({ readBack }) => readBack.rev > firstMotion.rev))
}

export function progressOf({ unitInId, fit, facts }: Standing, attempts: readonly NamedReadBack[]): Progress {
  return {
    fitted: unitInId !== null && (fit !== 'unfit' || facts.unfit !== undefined),
    safe: facts.safe !== undefined, readBack: lastCompared(attempts) !== undefined,
    firstMotion: facts.firstMotion !== undefined, running: facts.running !== undefined,
    ended: facts.released ? 'released' : facts.abandoned ? 'abandoned' : null,
  }
}

export const stepNow = (standing: Standing, attempts: readonly NamedReadBack[]) => stepOf(progressOf(standing, attempts))

/** Percentages that mean other newtons, and nobody has confirmed them yet. */
export function forcesOpen({ facts }: Pick<SwapRow, 'facts'>, kit: KitContent): boolean {
  return facts.forces === undefined && kit.adjustments.some(({ newtonsBefore }) => newtonsBefore !== null)
}

export function loadCanFall({ axis }: AxisPlace, kit: KitContent | null): boolean {
  return kit ? mayFall(axis.flags, kit.content) : axis.flags.includes('gravity')
}
