import type { MovesTold, ToldRow, ToldRun } from './moves-told'

export type MoveEntry
  = | { readonly key: string, readonly run: ToldRun, readonly index: number, readonly row?: undefined }
    | { readonly key: string, readonly run?: undefined, readonly index: number, readonly row: ToldRow, readonly hidden: boolean, readonly bracket: string }

/**
 * The rows with a line before each run that moved. Rows of a folded run, and rows as before while they are not asked for,
 * are hidden rather than left out: in print they stand. What changed is never hidden.
 */
export function foldedRows(told: MovesTold, opened: ReadonlySet<number>, sameShown: boolean): MoveEntry[] {
  const lines: MoveEntry[] = []
  const begun = new Set<number>()
  told.rows.forEach((row, index) => {
    const run = row.run === undefined ? undefined : told.runs[row.run]
    if (row.run !== undefined && run && !begun.has(row.run)) {
      begun.add(row.run)
      lines.push({ key: `run ${row.run}`, run, index: row.run })
    }
    const inRun = row.run !== undefined
    const folded = (row.state === 'moved' && inRun && !opened.has(row.run ?? -1)) || (row.state === 'same' && !sameShown)
    const first = inRun && told.rows[index - 1]?.run !== row.run
    const last = inRun && told.rows[index + 1]?.run !== row.run
    lines.push({ key: row.key, index, row, hidden: folded, bracket: [inRun && 'run', first && 'first', last && 'last'].filter(Boolean).join(' ') })
  })
  return lines
}
