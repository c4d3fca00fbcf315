import { describe, expect, it } from 'vitest'
import { decodeWindows1252 } from '../../../../shared/settings/windows-1252'

const holes = [0x81, 0x8d, 0x8f, 0x90, 0x9d]

describe('decodeWindows1252', () => {
  // The mapping of the encoding (WHATWG Encoding Standard, index windows-1252; from memory, not verified), bytes 80 to 9F.
  it('reads the upper block', () => {
    const bytes = Uint8Array.from({ length: 32 }, (_, index) => 0x80 + index).filter(byte => !holes.includes(byte))
    expect(decodeWindows1252(bytes)).toBe('€‚ƒ„…†‡ˆ‰Š‹ŒŽ‘’“”•–—˜™š›œžŸ')
  })

  it('is Latin-1 everywhere else, and gives each character to one byte', () => {
    const bytes = Uint8Array.from({ length: 256 }, (_, index) => index).filter(byte => byte < 0x80 || byte > 0x9f)
    expect(decodeWindows1252(bytes)).toBe(Buffer.from(bytes).toString('latin1'))
    const all = Uint8Array.from({ length: 256 }, (_, index) => index).filter(byte => !holes.includes(byte))
    expect(new Set(decodeWindows1252(all) as string).size).toBe(251)
  })

  it.each(holes)('stops at byte %d', (hole) => {
    expect(decodeWindows1252(Uint8Array.from([65, 0, hole, 66, hole]))).toBe(2)
  })

  it('finds one in a long file', () => {
    const bytes = new Uint8Array(100_000).fill(0xe4)
    expect(decodeWindows1252(bytes)).toBe('ä'.repeat(100_000))
    bytes[70_000] = 0x81
    expect(decodeWindows1252(bytes)).toBe(70_000)
  })
})
