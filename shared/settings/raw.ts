/*
 * What either form becomes before anything is judged: a tree that keeps every number as text and every value with its
 * place. One interpreter reads it, so that a rule holds for both forms.
 */

/** Where something stands: characters from the beginning; in CSV the beginning of the record, and the cell in it. */
export interface Spot { readonly offset: number, readonly end: number, readonly cell?: number }

export interface RawObject extends Spot {
  readonly kind: 'object'
  readonly keys: string[]
  /** Offset of each key, or of its record. */
  readonly keyOffsets: number[]
  readonly values: RawNode[]
}
export interface RawList extends Spot { readonly kind: 'list', readonly items: RawNode[] }
export interface RawText extends Spot { readonly kind: 'text', readonly text: string }
/** `value` is the exact result where that is sure without decimal arithmetic, else NaN: read the text then. */
export interface RawNumber extends Spot { readonly kind: 'number', readonly value: number }
export interface RawFlag extends Spot { readonly kind: 'flag', readonly value: boolean }
export interface RawNull extends Spot { readonly kind: 'null' }
/** A cell of the CSV form, the decimal sign made a point; its type is told by the field that it belongs to. */
export interface RawCell extends Spot { readonly kind: 'cell', readonly text: string, readonly unit: string }
/** A value that has been refused already: it is there, and nothing more is to be said about it. */
export interface RawRefused extends Spot { readonly kind: 'refused' }

export type RawNode = RawObject | RawList | RawText | RawNumber | RawFlag | RawNull | RawCell | RawRefused

/** The text behind the tree: tells where a spot is and what stands there. Only asked when there is an error to report. */
export interface Source {
  /** Line and column from 1; a column counts characters. */
  place(spot: Spot): { readonly line: number, readonly column: number }
  shown(spot: Spot): string
}
