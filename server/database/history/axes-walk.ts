import { newestFirst, type ChangeKey, type Walked } from './keys'

/*
 * The changes of many axes, newest first: stretch by stretch of the vault's order, each four times as long as the one before. In a
 * stretch every axis is one range of an index, and the few versions found there are put in order here; a walk along each axis
 * would read ahead on all of them, a join would sort all that they ever had.
 */

const firstWidth = 2048
const firstBatch = 64
const mostBatch = 1024

export const versionsOfAxesSql = 'SELECT v.id FROM json_each(:axisIds) a CROSS JOIN version v ON v.axis_id = a.value AND v.id BETWEEN :low AND :high'

/** What a walk has read: keys newest first, how many entries of an index it took, whether it is at its end. */
export interface Read { readonly keys: readonly Walked[], readonly entries: number, readonly ended: boolean }

export interface AxesWalk {
  readonly axisIds: readonly number[]
  /** Versions of these axes from `low` to `high`. */
  readonly versionsOf: (axisIds: string, low: number, high: number) => number[]
  /** What is asked for among the changes of these versions, lowest first. */
  readonly hitsAmong: (versionIds: readonly number[]) => readonly ChangeKey[]
}

/** Each call reads on below what the last one read. A key that is no hit says how far it came. */
export function readAxes({ axisIds, versionsOf, hitsAmong }: AxesWalk, first: number, below: ChangeKey): () => Read {
  const axes = JSON.stringify(axisIds)
  const found: number[] = []
  let [high, width, batch] = [below.versionId, firstWidth, firstBatch]
  return () => {
    let entries = 0
    while (found.length === 0 && high >= first) {
      const low = Math.max(first, high - width + 1)
      found.push(...versionsOf(axes, low, high).sort((a, b) => a - b))
      entries += axisIds.length
      high = low - 1
      width *= 4
    }
    const taken = found.splice(-batch)
    batch = Math.min(batch * 2, mostBatch)
    const keys = hitsAmong(taken).filter(key => newestFirst(below, key) < 0).map(key => ({ ...key, hit: true })).sort(newestFirst)
    const end = { versionId: taken[0] ?? first, seq: 0, hit: false }
    const last = keys.at(-1)
    const came = last !== undefined && newestFirst(last, end) === 0 ? keys : [...keys, end]
    return { keys: came, entries: entries + taken.length, ended: found.length === 0 && high < first }
  }
}
