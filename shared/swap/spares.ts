import { fits, type Fit, type UnfitReason } from './types'

/** One spare as the finder ranks it. */
export interface RankedSpare {
  readonly fit: Fit
  readonly reasons: readonly UnfitReason[]
  /** How many values change. */
  readonly adjusted: number
  readonly sameModel: boolean
  readonly sameFirmware: boolean
  /** It lies at the axis' site, and the register says where. */
  readonly near: boolean
  readonly serial: string
}

const isHard = ({ reasons }: Pick<RankedSpare, 'reasons'>) => reasons.some(({ hard }) => hard)

/**
 * Those that fit first (same, adjust, unfit, unfit beyond all leave); among them the same model, the same firmware, the fewest
 * values that change, those that lie at hand, then by serial. The order of the list that came in decides nothing.
 */
export function rankSpares<Spare extends RankedSpare>(spares: readonly Spare[]): Spare[] {
  const key = (spare: Spare) => [
    fits.indexOf(spare.fit), isHard(spare) ? 1 : 0, spare.sameModel ? 0 : 1, spare.sameFirmware ? 0 : 1, spare.adjusted, spare.near ? 0 : 1,
  ]
  return spares.map(spare => ({ spare, key: key(spare) })).sort((one, other) => {
    const at = one.key.findIndex((part, index) => part !== other.key[index])
    return at >= 0 ? (one.key[at] ?? 0) - (other.key[at] ?? 0) : one.spare.serial < other.spare.serial ? -1 : one.spare.serial > other.spare.serial ? 1 : 0
  }).map(({ spare }) => spare)
}

/** Whether a spare could go in tonight without anybody's leave. */
export function fitsTonight({ fit }: Pick<RankedSpare, 'fit'>): boolean {
  return fit !== 'unfit'
}
