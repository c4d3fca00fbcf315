import type { Swap } from '#shared/api/swaps'

type LogLine = Swap['log'][number]
/** Acts that were done one after another by one person and are read as one: ticks, or states of a note. */
export interface LogRun { readonly newest: LogLine, /** Those before it, the newest first. */ readonly before: readonly LogLine[] }

const folds = new Set(['ticked', 'note'])

/** The log newest first; runs of ticks, and of a note that was written on, stand as one. */
export function foldedLog(log: Swap['log']): LogRun[] {
  return log.toReversed().reduce<LogRun[]>((runs, line) => {
    const last = runs.at(-1)
    const goesOn = last !== undefined && folds.has(line.act) && last.newest.act === line.act && last.newest.by === line.by
    return goesOn ? [...runs.slice(0, -1), { ...last, before: [...last.before, line] }] : [...runs, { newest: line, before: [] }]
  }, [])
}
