/*
 * Bytes 80 to 9F of Windows-1252, 0 where it has no character (81, 8D, 8F, 90, 9D); all others are Latin-1. Our own table,
 * since Node 20 decodes this encoding as Latin-1.
 */
const upper = [
  0x20ac, 0, 0x201a, 0x0192, 0x201e, 0x2026, 0x2020, 0x2021, 0x02c6, 0x2030, 0x0160, 0x2039, 0x0152, 0, 0x017d, 0,
  0, 0x2018, 0x2019, 0x201c, 0x201d, 0x2022, 0x2013, 0x2014, 0x02dc, 0x2122, 0x0161, 0x203a, 0x0153, 0, 0x017e, 0x0178,
]
const chunk = 4096

/** The text of Windows-1252 bytes, or the offset of the first byte that the encoding leaves without a character. */
export function decodeWindows1252(bytes: Uint8Array): string | number {
  let text = ''
  for (let start = 0; start < bytes.length; start += chunk) {
    const codes: number[] = []
    for (const byte of bytes.subarray(start, start + chunk)) {
      const code = byte >= 0x80 && byte <= 0x9f ? upper[byte - 0x80] : byte
      if (code === undefined || (code === 0 && byte !== 0)) return start + codes.length
      codes.push(code)
    }
    text += String.fromCharCode(...codes)
  }
  return text
}
