import { encode } from 'uqr'
import type { Paper } from './paper'

/**
 * Draws a QR code (ISO/IEC 18004) of error correction M into a square, quiet zone of four modules included. Each row of dark
 * modules that touch is one rectangle, so that no hair shows between them.
 */
export function drawQr(paper: Paper, text: string, x: number, y: number, side: number, quiet = 4): void {
  const { data, size } = encode(text, { ecc: 'M', border: 0 })
  const module = side / (size + 2 * quiet)
  data.forEach((row, index) => {
    for (const [from, to] of darkRuns(row)) paper.fill(x + (quiet + from) * module, y + (quiet + index) * module, (to - from) * module, module * 1.01)
  })
}

/** Where dark modules follow one another: from including, to not including. */
function darkRuns(row: readonly boolean[]): [number, number][] {
  const runs: [number, number][] = []
  row.forEach((dark, index) => {
    const last = runs.at(-1)
    if (!dark) return
    if (last?.[1] === index) last[1] = index + 1
    else runs.push([index, index + 1])
  })
  return runs
}
