import type { ReadOutcome, Normalised } from './types'
import type { Source } from './raw'
import { TokenError } from './json-cursor'
import { jsonTree } from './json-tokens'
import { placeOf } from './place'
import { Problems } from './problems'
import { readFile } from './read-file'

function sourceOf(text: string): Source {
  return { place: spot => placeOf(text, spot.offset), shown: spot => text.slice(spot.offset, spot.end) }
}

/** Reads the JSON form from its text (without byte-order mark): the file, or everything that is wrong with it. */
export function readJson(text: string, encoding: Normalised['encoding'] = 'utf-8'): ReadOutcome {
  const source = sourceOf(text)
  const problems = new Problems(source)
  const tree = treeOf(text, problems)
  if (tree === undefined) return problems.outcome()
  if (tree.kind !== 'object') {
    problems.addValue('json-syntax', '', tree, 'A settings file is one object { … }.')
    return problems.outcome()
  }
  const reading = { source, problems, rounded: 0, converted: 0 }
  const read = readFile(reading, tree)
  if (read === undefined) return problems.outcome()
  const { rounded, converted } = reading
  return { ok: true, value: { ...read, normalised: { form: 'json', rounded, converted, encoding, decodedTexts: [] } } }
}

function treeOf(text: string, problems: Problems) {
  try {
    return jsonTree(text)
  }
  catch (error) {
    if (!(error instanceof TokenError)) throw error
    problems.add(error.code, '', { offset: error.offset, end: error.offset }, error.message)
    return undefined
  }
}
