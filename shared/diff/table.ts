/** One move table as the alignment sees it: numbers of the rows, ascending, and of their signatures. */
export interface Table { readonly numbers: Int32Array, readonly signatures: Int32Array }

/** A row of the first table with its partner in the second, by index. */
export type IndexPair = readonly [before: number, after: number]

/** One whole number a row. Int32Array.from with a function does the same and takes ten times as long. */
export function wholeNumbers<Row>(rows: readonly Row[], numberOf: (row: Row) => number): Int32Array {
  const numbers = new Int32Array(rows.length)
  for (let index = 0; index < rows.length; index += 1) numbers[index] = numberOf(rows[index] as Row)
  return numbers
}
