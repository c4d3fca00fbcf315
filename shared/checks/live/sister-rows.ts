import type { Content } from '../../settings/types'

/** What a row of moves is called among sisters. */
export interface RowName {
  /** The same on every sister whose row does the same. */
  readonly key: string
  /** The number by which most know it; of a row that most have not, its own. */
  readonly number: string
  /** Of a row that stands elsewhere than on most: its own number and theirs. */
  readonly here?: string
}

/** Pairs rows of two contents by what they do, in the order of the second, by their numbers; undefined where each keeps its number. */
export type PairsOf = (model: Content, content: Content) => readonly { readonly before?: number, readonly after?: number }[] | undefined

export type NameOf = (move: number) => RowName

/** A row by its own number, which is its name wherever no row was put in or taken out. */
export const byNumber: NameOf = move => ({ key: `move ${move}`, number: String(move) })

/**
 * Names of the rows of each sister, by the table that most of them have, or the first where all differ: a row put in renumbers
 * those behind it and rewrites none, so rows are paired as a difference pairs them.
 */
export function rowNames(contents: readonly Content[], pairsOf: PairsOf): NameOf[] {
  const model = mostCommon(contents)
  return contents.map(content => model ? namesIn(model, content, pairsOf) : byNumber)
}

function namesIn(model: Content, content: Content, pairsOf: PairsOf): NameOf {
  const pairs = content === model ? undefined : pairsOf(model, content)
  if (!pairs) return byNumber
  const names = new Map<number, RowName>()
  let behind = 'the start', added = 0
  for (const { before, after } of pairs) {
    if (before !== undefined) [behind, added] = [String(before), 0]
    if (after === undefined) continue
    if (before === undefined) names.set(after, { key: `move added after ${behind}, ${added += 1}`, number: String(after), here: `move ${after} (added)` })
    else if (before !== after) names.set(after, { key: `move ${before}`, number: String(before), here: `move ${after} (${before} on the others)` })
  }
  return move => names.get(move) ?? byNumber(move)
}

function mostCommon(contents: readonly Content[]): Content | undefined {
  const alike = new Map<string, Content[]>()
  for (const content of contents) {
    const table = content.moves.map(({ move, kind, target }) => `${move} ${kind} ${target}`).join('\n')
    alike.set(table, [...alike.get(table) ?? [], content])
  }
  return [...alike.values()].reduce<readonly Content[]>((most, group) => group.length > most.length ? group : most, [])[0]
}
