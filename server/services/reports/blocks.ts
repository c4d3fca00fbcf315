import type { Face } from '../paper/font-files'

/** What the paper of a report is laid out of, top to bottom. */
export type Block
  = | { readonly kind: 'heading', readonly level: 1 | 2 | 3, readonly text: string, /** At the right end of its line. */ readonly aside?: string }
    | { readonly kind: 'text', readonly text: string, readonly face?: Face, readonly size?: number, readonly indent?: number }
    | { readonly kind: 'fact', readonly label: string, readonly value: string, /** Words in Inter, values in JetBrains Mono. */ readonly face?: Face }
    | { readonly kind: 'gap', readonly height: number }
    | { readonly kind: 'row', readonly columns: readonly Column[], readonly cells: readonly string[] }

/** `share` of the width; those of a table add up to 1. A table is known by its columns: the same array, the same table. */
export interface Column { readonly head: string, readonly share: number, readonly face?: Face }
