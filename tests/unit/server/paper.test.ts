import { describe, expect, it } from 'vitest'
import { faces, fontFile, scriptsOf } from '../../../server/services/paper/font-files'
import { millimetres, Paper } from '../../../server/services/paper/paper'
import { drawQr } from '../../../server/services/paper/qr'
import { openTypeOf } from '../../../server/services/paper/woff'
import { zipOf } from '../../../server/services/paper/zip'
import { pageSizes, pdfText, qrOf, unzipped } from '../../support/paper'

const at = '2026-12-01T06:00:00.000Z'
const paper = () => {
  const made = new Paper('A4', { title: 'try', at })
  made.addPage()
  return made
}

describe('a font', () => {
  it('of each face and script is unpacked to an OpenType font whose table checksums hold', () => {
    for (const face of faces) {
      for (const script of scriptsOf(face)) {
        const font = fontFile(face, script)
        expect([0x00010000, 0x4f54544f], `${face} ${script}`).toContain(font.readUInt32BE(0))
        for (let index = 0; index < font.readUInt16BE(4); index += 1) {
          const entry = 12 + index * 16
          const tag = font.toString('latin1', entry, entry + 4)
          const [sum, offset, length] = [font.readUInt32BE(entry + 4), font.readUInt32BE(entry + 8), font.readUInt32BE(entry + 12)]
          // OpenType 1.9, "Calculating checksums": the sum of all 32-bit words; in `head` the adjustment counts as 0.
          let reckoned = 0
          for (let word = 0; word < Math.ceil(length / 4); word += 1) reckoned = (reckoned + (tag === 'head' && word === 2 ? 0 : font.readUInt32BE(offset + 4 * word))) >>> 0
          expect(reckoned, `${face} ${script} ${tag}`).toBe(sum)
        }
      }
    }
  })

  it('that is none is refused', () => {
    expect(() => openTypeOf(Buffer.from('wOF2 and something that is no WOFF 1.0 at all, long enough'))).toThrow(RangeError)
    expect(() => openTypeOf(Buffer.alloc(3))).toThrow(RangeError)
  })
})

describe('a paper', () => {
  it('has its size in points, A4, Letter or a label', async () => {
    const sizes = await Promise.all((['A4', 'Letter', { width: millimetres(100), height: millimetres(50) }] as const).map(async (size) => {
      const made = new Paper(size, { title: 'try', at })
      made.addPage()
      return pageSizes(await made.bytes())[0]?.map(Math.round)
    }))
    expect(sizes).toEqual([[595, 842], [612, 792], [283, 142]])
  })

  it('cuts long words at their hyphens, and what is left over ends in three dots', () => {
    const made = paper()
    const width = made.widthOf('Zustellung')
    expect(made.lines('Schließ-Zustellung oben', width)).toEqual(['Schließ-', 'Zustellung', 'oben'])
    expect(made.lines('Zustellungen', width).join('')).toBe('Zustellungen')
    expect(made.linesOf('oben', width, 1)).toEqual(['oben'])
    const [first, last = '', ...rest] = made.linesOf('Schließ-Zustellung oben und unten', width, 2)
    expect([first, rest]).toEqual(['Schließ-', []])
    expect(last).toMatch(/^Zustell.*…$/)
    expect(made.widthOf(last)).toBeLessThanOrEqual(width)
  })

  it('writes every sign of the trade, other scripts, and the code point of what no font has', async () => {
    const made = paper()
    const words = 'mm/s² ± −90° 3×5 µm · N·m ’ … – Łódź Ελλάδα Жук Đặng'
    made.text(words, 40, 60)
    made.text(words, 40, 80, { face: 'mono-bold' })
    made.text('bolt 螺 end 3→4', 40, 100)
    const after = made.text('≥ 3 K, ≤ ⌀ 5', 40, 120)
    expect(after - 40).toBeCloseTo(made.widthOf('>= 3 K, <= Ø 5'), 6)
    const text = pdfText(await made.bytes())
    expect(text).toContain('>= 3 K, <= Ø 5')
    expect(text.split('\n').filter(line => line.includes(words))).toHaveLength(2)
    expect(text).toContain('bolt U+87BA end 3›4')
  })

  it('writes hyphens and arrows of a serial sign by sign', async () => {
    const made = paper()
    made.text('HL40--23->00417', 40, 60, { face: 'mono' })
    expect(pdfText(await made.bytes())).toContain('HL40--23->00417')
  })

  it('cuts lines at spaces and within words that are too long, and loses nothing', () => {
    const made = paper()
    const text = `short words and ${'x'.repeat(200)} at the end`
    const lines = made.lines(text, 120)
    expect(lines.every(line => made.widthOf(line) <= 120)).toBe(true)
    expect(lines.join('').replaceAll(' ', '')).toBe(text.replaceAll(' ', ''))
    expect(made.lines('', 120)).toEqual([])
  })

  it('measures JetBrains Mono as 600 of 1000 a sign', () => expect(paper().widthOf('1234', { face: 'mono', size: 10 })).toBeCloseTo(24, 9))
})

describe('a QR code', () => {
  it.each(['https://marks.example/axes/LID-02.Z', 'LID-02.Z', `https://marks.example/axes/${'X'.repeat(32)}`])('says %s when read from the page', async (address) => {
    const made = paper()
    drawQr(made, address, 300, 200, millimetres(31))
    expect(qrOf(await made.bytes())).toBe(address)
  })
})

describe('a ZIP', () => {
  it('is opened by unzip, packed and unpacked files alike, in folders', () => {
    const files = [
      { name: 'a/words.txt', bytes: Buffer.from('words '.repeat(1000)), packed: false }, { name: 'b.pdf', bytes: Buffer.from([0, 1, 2, 255]), packed: true }, { name: 'empty', bytes: Buffer.alloc(0), packed: false },
    ]
    const out = unzipped(zipOf(files, at))
    expect([...out.values()].map(bytes => bytes.toString('latin1')).sort()).toEqual(files.map(({ bytes }) => bytes.toString('latin1')).sort())
    expect(out.get('b.pdf')?.equals(Buffer.from([0, 1, 2, 255]))).toBe(true)
  })
})
