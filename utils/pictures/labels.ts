import { extentOf, type PlacedLabel } from '#shared/pictures/scale'

/* Texts of a picture where nothing else stands. */

export interface PlacedText extends PlacedLabel { readonly y: number }
/** What a text takes: left and right end, and its base line. */
export interface Spot { readonly from: number, readonly to: number, readonly y: number }

const lineHeight = 14
const air = 6

/** The first of the wanted places that meets nothing placed so far and stays within the picture; it is taken from then on. */
export function clearOf(wanted: readonly PlacedText[], placed: Spot[], right: number): PlacedText | undefined {
  for (const text of wanted) {
    const [from, to] = extentOf(text)
    if (from < 0 || to > right + 8) continue
    if (placed.some(other => Math.abs(other.y - text.y) < lineHeight && from < other.to + air && other.from < to + air)) continue
    placed.push({ from, to, y: text.y })
    return text
  }
  return undefined
}
