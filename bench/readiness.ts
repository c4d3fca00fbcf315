import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { readAllAxes } from '../server/database/axis-state/list'
import { readBoard } from '../server/services/board/board'
import { readinessOf } from '../server/services/readiness/readiness'
import { readStock } from '../server/services/readiness/stock'
import { atMost, type Figure } from './figure'
import { largePlant } from './large-plant'

/*
 * Whether each of 10,000 axes could be restored tonight, as the head of the board has it, and the whole answer of the board:
 * in this process, on a real file, after the first reading. CPU time, which what else the machine does hardly moves.
 */

const axes = 10_000
const rounds = 60

/** CPU milliseconds of each round. */
function spent(work: () => unknown): number[] {
  return Array.from({ length: rounds }, () => {
    const before = process.cpuUsage()
    work()
    const { user, system } = process.cpuUsage(before)
    return (user + system) / 1000
  })
}

const p95 = (values: readonly number[]) => [...values].sort((a, b) => a - b)[Math.floor(values.length * 0.95)] ?? NaN

/** Figures of readiness and of the whole board. */
export async function measureReadiness(): Promise<Figure[]> {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-bench-'))
  try {
    const { vault, actor } = await largePlant(folder, axes)
    const first = readBoard(vault, actor)
    if (first.axes.length !== axes || first.pending > 0) throw new Error(`Of ${first.axes.length} axes ${first.pending} are not worked out.`)
    const head = () => {
      const now = vault.now()
      const stock = readStock(vault.db, now)
      return readAllAxes(vault.db, null).filter(row => !readinessOf(row, stock, now).ready).length
    }
    const figures = [
      atMost(`readiness of ${axes} axes, CPU in the server, p95`, p95(spent(head)), 20, 'ms'),
      atMost(`board of ${axes} axes, CPU in the server, p95`, p95(spent(() => readBoard(vault, actor))), 100, 'ms'),
    ]
    vault.close()
    return figures
  }
  finally {
    rmSync(folder, { recursive: true })
  }
}
