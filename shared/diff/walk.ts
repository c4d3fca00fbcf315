/** Meets every row of two tables once, in the order of their numbers; rows of one number together, an absent one as undefined. */
export function walkByNumber<Row>(
  before: readonly Row[], after: readonly Row[], numberOf: (row: Row) => number,
  visit: (before: Row | undefined, beforeIndex: number, after: Row | undefined, afterIndex: number) => void,
): void {
  let i = 0
  let j = 0
  while (i < before.length || j < after.length) {
    const was = before[i]
    const is = after[j]
    const order = was === undefined ? 1 : is === undefined ? -1 : numberOf(was) - numberOf(is)
    visit(order <= 0 ? was : undefined, i, order >= 0 ? is : undefined, j)
    if (order <= 0) i += 1
    if (order >= 0) j += 1
  }
}
