import { FILE_HEADERS_ONLY, formatPatch, structuredPatch, type StructuredPatch } from 'diff'

const context = 3
/** Lines removed and added. The search costs their square: a table of 1,024 moves renumbered takes it more than a minute. */
const mostEdits = 1000

/**
 * The two CSV forms line by line, in the unified form with three lines around each difference; empty where they are equal.
 * For the raw view only: rows renumbered come out as rows rewritten, and beyond 1,000 lines of difference all that lies
 * between the first and the last of them comes out as one block.
 */
export function textDifference(before: string, after: string): string {
  if (before === after) return ''
  const found = structuredPatch('before', 'after', before, after, undefined, undefined, { context, maxEditLength: mostEdits })
  return formatPatch(found ?? oneBlock(linesOf(before), linesOf(after)), FILE_HEADERS_ONLY)
}

/** Lines with their ends, so that a last line without one differs from a line that has it. */
function linesOf(text: string): string[] {
  return text.split(/(?<=\n)/)
}

function oneBlock(before: readonly string[], after: readonly string[]): StructuredPatch {
  const shorter = Math.min(before.length, after.length)
  let first = 0
  while (first < shorter && before[first] === after[first]) first += 1
  let last = 0
  while (last < shorter - first && before.at(-1 - last) === after.at(-1 - last)) last += 1
  const start = Math.max(0, first - context)
  const kept = Math.max(0, last - context)
  const lines = [
    ...before.slice(start, first).flatMap(line => marked(' ', line)),
    ...before.slice(first, before.length - last).flatMap(line => marked('-', line)),
    ...after.slice(first, after.length - last).flatMap(line => marked('+', line)),
    ...before.slice(before.length - last, before.length - kept).flatMap(line => marked(' ', line)),
  ]
  const hunk = { oldStart: start + 1, oldLines: before.length - kept - start, newStart: start + 1, newLines: after.length - kept - start, lines }
  return { oldFileName: 'before', newFileName: 'after', oldHeader: undefined, newHeader: undefined, index: undefined, hunks: [hunk] }
}

function marked(mark: string, line: string): string[] {
  return line.endsWith('\n') ? [mark + line.slice(0, -1)] : [mark + line, '\\ No newline at end of file']
}
