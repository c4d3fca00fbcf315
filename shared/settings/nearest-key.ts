const longestKey = 64

/** How many single-character insertions, removals, replacements turn one text into the other (Levenshtein). */
export function editDistance(from: string, to: string): number {
  let row = Array.from({ length: to.length + 1 }, (_, index) => index)
  for (let i = 1; i <= from.length; i += 1) {
    const next = [i]
    for (let j = 1; j <= to.length; j += 1) {
      const replaced = (row[j - 1] ?? 0) + (from[i - 1] === to[j - 1] ? 0 : 1)
      next.push(Math.min(replaced, (row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1))
    }
    row = next
  }
  return row[to.length] ?? 0
}

/** The known key that was probably meant: nearest without regard to case, at most a third of it wrong; none where two are equally near. */
export function nearestKey(key: string, known: Iterable<string>): string | undefined {
  if (key.length > longestKey) return undefined
  let best: string | undefined
  let bestDistance = Infinity
  for (const each of known) {
    const distance = editDistance(key.toLowerCase(), each.toLowerCase())
    if (distance > bestDistance || distance * 3 > Math.max(each.length, 3)) continue
    best = distance === bestDistance ? undefined : each
    bestDistance = distance
  }
  return best
}
