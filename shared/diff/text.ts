import { createTwoFilesPatch } from 'diff'

/**
 * The two CSV forms line by line, in the unified form with three lines around each difference; empty where they are equal.
 * For the raw view only: rows renumbered come out as rows rewritten.
 */
export function textDifference(before: string, after: string): string {
  return before === after ? '' : createTwoFilesPatch('before', 'after', before, after, undefined, undefined, { context: 3 })
}
