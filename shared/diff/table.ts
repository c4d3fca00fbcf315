/** One move table as the alignment sees it: numbers of the rows, ascending, and of their signatures. */
export interface Table { readonly numbers: Int32Array, readonly signatures: Int32Array }

/** A row of the first table with its partner in the second, by index. */
export type IndexPair = readonly [before: number, after: number]
