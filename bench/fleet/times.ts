import { atMost, type Figure } from '../figure'

/**
 * CPU milliseconds of each asking, after a tenth of them to warm up; `at` counts the askings. What else the machine does hardly
 * moves them, and on a quiet one they are the time that passes: the vault's file lies in memory.
 */
export function timesOf(askings: number, ask: (at: number) => unknown): number[] {
  const times: number[] = []
  for (let at = 0; at < askings * 1.1; at += 1) {
    const before = process.cpuUsage()
    ask(at)
    const { user, system } = process.cpuUsage(before)
    times.push((user + system) / 1000)
  }
  return times.slice(-askings)
}

/** Milliseconds that pass for each asking: of a peer in a process of its own, and of ours beside it. */
export function elapsedOf(askings: number, ask: (at: number) => unknown): number[] {
  const times: number[] = []
  for (let at = 0; at < askings * 1.1; at += 1) {
    const begun = performance.now()
    ask(at)
    times.push(performance.now() - begun)
  }
  return times.slice(-askings)
}

/** The same where the answer is waited for. */
export async function timesOfAsync(askings: number, ask: (at: number) => Promise<unknown>): Promise<number[]> {
  const times: number[] = []
  for (let at = 0; at < askings * 1.1; at += 1) {
    const begun = performance.now()
    await ask(at)
    times.push(performance.now() - begun)
  }
  return times.slice(-askings)
}

export function percentile(times: readonly number[], part: number): number {
  return [...times].sort((a, b) => a - b)[Math.floor((times.length - 1) * part / 100)] ?? Number.NaN
}

/** Both against the aim, which is for the 95th in a hundred. */
export function figuresOf(name: string, times: readonly number[], aim: number): Figure[] {
  return [atMost(`${name}, p50`, percentile(times, 50), aim, 'ms'), atMost(`${name}, p95`, percentile(times, 95), aim, 'ms')]
}

/** Spread evenly without being regular: the fraction of multiples of the golden section. */
export const spread = (at: number, of: number): number => Math.floor((at * 0.618_033_988_749_895) % 1 * of)
