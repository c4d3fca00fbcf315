/** One measured figure. `value` and `target` are ratios against a peer measured in the same run, unless `unit` says otherwise. */
export interface Figure {
  readonly name: string
  readonly value: number
  readonly unit: string
  readonly target: number
  /** Whether value <= target. */
  readonly holds: boolean
}

/** A figure that should not exceed its target. */
export function atMost(name: string, value: number, target: number, unit = 'ratio'): Figure {
  return { name, value, unit, target, holds: value <= target }
}

/** Median; of an even number of values the upper middle. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = sorted[Math.floor(sorted.length / 2)]
  if (middle === undefined) throw new Error('median of nothing')
  return middle
}

/**
 * Median of per-round ratios of CPU time, contender against peer, in interleaved rounds: what disturbs the machine for a
 * while disturbs both. Each function is run `repeats` times a round.
 */
export function ratioOf(contender: () => unknown, peer: () => unknown, rounds = 15, repeats = 200): number {
  const spend = (work: () => unknown) => {
    const before = process.cpuUsage()
    for (let index = 0; index < repeats; index += 1) work()
    const used = process.cpuUsage(before)
    return used.user + used.system
  }
  spend(contender)
  spend(peer)
  const ratios: number[] = []
  for (let round = 0; round < rounds; round += 1) {
    const [first, second] = round % 2 === 0 ? [contender, peer] : [peer, contender]
    const a = spend(first)
    const b = spend(second)
    ratios.push(round % 2 === 0 ? a / Math.max(b, 1) : b / Math.max(a, 1))
  }
  return median(ratios)
}
