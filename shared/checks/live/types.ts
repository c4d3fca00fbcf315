import type { CheckResult } from '../types'

/** An answer about several axes as they stand now; shown where it is asked for, never kept with a version. */
export interface LiveResult extends CheckResult {
  /** Tags of the axes it is about. `at` points into the content of each of them. */
  readonly axes: readonly string[]
}
