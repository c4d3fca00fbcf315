/** Line and column of an offset, from 1; lines end with LF (a CR before it belongs to its line), a column counts characters. */
export function placeOf(text: string, offset: number): { readonly line: number, readonly column: number } {
  let line = 1
  let start = 0
  for (let end = text.indexOf('\n'); end !== -1 && end < offset; end = text.indexOf('\n', start)) {
    line += 1
    start = end + 1
  }
  return { line, column: [...text.slice(start, offset)].length + 1 }
}
