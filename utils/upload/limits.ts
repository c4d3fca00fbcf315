/*
 * What one list of files may hold. The size of a file is that of the settings format; the rest keeps a browser tab alive
 * when somebody drops a whole disk.
 */
export const mostFiles = 500
export const mostBytesOfFile = 2 * 1024 * 1024
export const mostBytesOfAll = 64 * 1024 * 1024

/** Bytes as people say them: 912 B, 14 kB, 2.1 MB. */
export function bytesInWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`
  if (bytes < 1_000_000) return `${Math.ceil(bytes / 1000)} kB`
  return `${(bytes / 1_000_000).toFixed(1)} MB`
}
