/**
 * Whether a firmware revision comes before another: runs of digits count as numbers ("2.9" before "2.14"), a beginning of
 * the other comes before it. Revisions whose words differ ("A2" and "B1") have no order: false.
 */
export function isOlderFirmware(one: string, other: string): boolean {
  const left = parts(one)
  for (const [i, b] of parts(other).entries()) {
    const a = left[i]
    if (a === undefined) return true
    if (a === b) continue
    return typeof a === 'number' && typeof b === 'number' && a < b
  }
  return false
}

function parts(revision: string): (string | number)[] {
  return (revision.match(/\d+|[^\d.\-_ ]+/g) ?? []).map(part => /^\d/.test(part) ? Number(part) : part.toLowerCase())
}
