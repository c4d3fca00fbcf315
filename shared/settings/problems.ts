import type { FormatError, FormatErrorCode } from './types'
import type { Source, Spot } from './raw'

export const maxErrors = 100
const shownCharacters = 80

export interface Hints { readonly value?: string, readonly meant?: string }

/** Gathers everything that is wrong in one file; keeps the first 100 and counts the rest. */
export class Problems {
  private readonly kept: { readonly error: FormatError, readonly offset: number }[] = []
  private count = 0

  constructor(private readonly source: Source) {}

  /** A value that stands in the file is shown with it, unless the hints give another. `spot` is absent where nothing stands. */
  add(code: FormatErrorCode, at: string, spot: Spot | undefined, message: string, hints: Hints = {}): void {
    this.count += 1
    if (this.full) return
    const error = { at, ...(spot ? this.source.place(spot) : {}), code, message, ...cutHints(hints) }
    this.kept.push({ error, offset: spot?.offset ?? 0 })
  }

  /** As `add`, and shows what stands at the spot. */
  addValue(code: FormatErrorCode, at: string, spot: Spot, message: string, meant?: string): void {
    this.add(code, at, spot, message, this.full ? {} : { value: this.source.shown(spot), ...(meant === undefined ? {} : { meant }) })
  }

  /** All that were added, kept or not. */
  get total(): number {
    return this.count
  }

  /** Whether what is added from now on is only counted: hints that cost time need not be looked for. */
  get full(): boolean {
    return this.kept.length >= maxErrors
  }

  /** In the order of the file; 'more' says how many were not kept. */
  outcome(): { readonly ok: false, readonly errors: readonly FormatError[], readonly more: number } {
    const errors = [...this.kept].sort((a, b) => a.offset - b.offset).map(each => each.error)
    return { ok: false, errors, more: this.count - errors.length }
  }
}

function cutHints(hints: Hints): Hints {
  return hints.value === undefined ? hints : { ...hints, value: cutText(hints.value) }
}

/** At most 80 characters (code points) of a text, as an error shows it. */
export function cutText(text: string): string {
  if (text.length <= shownCharacters) return text
  const characters = [...text.slice(0, 2 * shownCharacters)]
  return characters.length <= shownCharacters ? characters.join('') : characters.slice(0, shownCharacters).join('')
}
