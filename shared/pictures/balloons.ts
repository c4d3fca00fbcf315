import { tenth, textWidth } from './scale'
import type { Crowd } from './stack'

export const balloonRadius = 11.5

/** A box with the count of balloons that found no room in one place. */
export interface CrowdBox { readonly x: number, readonly y: number, readonly width: number, readonly height: number, readonly text: string, readonly moves: readonly number[] }

/** The box at a height, moved inwards at the two ends of the picture. */
export function crowdBox({ px, moves }: Crowd, y: number, left: number, right: number, radius = balloonRadius): CrowdBox {
  const text = `+${moves.length}`
  const width = textWidth(text) + 10
  return { x: tenth(Math.min(Math.max(px - width / 2, left), right - width)), y: y - radius + 1, width: tenth(width), height: 2 * radius - 2, text, moves }
}
