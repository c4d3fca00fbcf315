/*
 * What a restore sheet says, before anybody decides where on the paper it stands. Every text is ready to be printed: numbers
 * as the drive wants them, with a real minus sign.
 */

/** One value to be written. */
export interface SheetValue {
  /** The drive's own number, by the entry table; '' where there is none. */
  readonly number: string
  readonly label: string
  readonly value: string
  readonly unit: string
  /** What stands beside: a coded value in words, newtons of a percentage, "prove". */
  readonly beside: string
  readonly group: string
}

/** One value that is not copied: an empty place to note what was taught. */
export interface SheetTaught { readonly number: string, readonly label: string, readonly unit: string }

export interface SheetColumn {
  readonly field: string
  readonly head: string
  readonly unit: string
  /** Numbers stand on their decimal point, words at their beginning. */
  readonly numeric: boolean
}

/** How a move is called. */
export type MoveCall
  /** Select inputs from the highest to input 1: on or off. */
  = | { readonly by: 'inputs', readonly on: readonly boolean[] }
    /** It follows another move by itself. */
    | { readonly by: 'itself' }
    /** Over the bus, or not at all: too few inputs reach it. */
    | { readonly by: 'bus' | 'nothing' }

export interface SheetMove {
  readonly move: number
  readonly call: MoveCall
  /** Kept empty on purpose. */
  readonly unused: boolean
  /** By the sheet's columns; '' where nothing is set. */
  readonly cells: readonly string[]
  readonly comment: string
}

export interface SheetMoves { readonly inputs: number, readonly columns: readonly SheetColumn[], readonly rows: readonly SheetMove[] }
