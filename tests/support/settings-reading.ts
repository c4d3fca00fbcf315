import { jsonTree } from '../../shared/settings/json-tokens'
import { placeOf } from '../../shared/settings/place'
import { Problems } from '../../shared/settings/problems'
import type { RawNode, RawObject } from '../../shared/settings/raw'
import type { Reading } from '../../shared/settings/reading'

export interface TestReading {
  readonly reading: Reading
  readonly node: RawNode
  /** What was reported: `code at` for each, in the order of the text. */
  told(): readonly string[]
  /** The message of the first problem. */
  message(): string | undefined
}

/** A JSON text as a tree, with what the readers of its parts need. */
export function readingOf(text: string): TestReading {
  const source = { place: (spot: { offset: number }) => placeOf(text, spot.offset), shown: (spot: { offset: number, end: number }) => text.slice(spot.offset, spot.end) }
  const problems = new Problems(source)
  return {
    reading: { source, problems, rounded: 0, converted: 0 },
    node: jsonTree(text),
    told: () => problems.outcome().errors.map(({ code, at }) => `${code} ${at}`),
    message: () => problems.outcome().errors[0]?.message,
  }
}

/** As readingOf, where the text is one object. */
export function objectReadingOf(text: string): TestReading & { readonly object: RawObject } {
  const all = readingOf(text)
  if (all.node.kind !== 'object') throw new Error(`not an object: ${text}`)
  return { ...all, object: all.node }
}

/** As readingOf, for one cell of the CSV form. */
export function cellReadingOf(text: string, unit = ''): TestReading {
  const source = { place: () => ({ line: 1, column: 1 }), shown: () => text }
  const problems = new Problems(source)
  return {
    reading: { source, problems, rounded: 0, converted: 0 },
    node: { kind: 'cell', offset: 0, end: 0, cell: 3, text, unit },
    told: () => problems.outcome().errors.map(({ code, at }) => `${code} ${at}`),
    message: () => problems.outcome().errors[0]?.message,
  }
}
