import { moveRow } from './move-row'
import type { Content } from './types'

/** The content of a canonical text that canonicalText wrote, its rows in the one shape; nothing is judged a second time. Throws SyntaxError on what is no JSON. */
export function contentOfText(text: string): Content {
  const content = JSON.parse(text) as Content
  return { ...content, moves: content.moves.map(moveRow) }
}
