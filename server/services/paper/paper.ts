import PDFDocument from 'pdfkit'
import { fontFile, scriptsOf, type Face, type Script } from './font-files'

/*
 * A sheet of paper to write on, over the PDF writer: points from the upper left corner, text by face and size on a base line.
 * A sign that none of the shipped fonts has is written as its code point, U+4E2D, so that nothing is lost without a trace.
 */

export const millimetres = (value: number) => value * 72 / 25.4

export type PaperSize = 'A4' | 'Letter' | { readonly width: number, readonly height: number }
export interface TextStyle { readonly face?: Face, readonly size?: number, readonly align?: 'left' | 'right' | 'center', readonly colour?: string }

/** Where a picture stands, and how many points one of its units takes. */
export interface Picture { readonly x: number, readonly y: number, readonly scale: number }

/** The part of a font of the PDF writer's own library that is used here. */
interface Glyph { readonly id: number, readonly advanceWidth: number, readonly codePoints: readonly number[] }
interface Font {
  readonly unitsPerEm: number
  readonly hasGlyphForCodePoint: (code: number) => boolean
  readonly glyphForCodePoint: (code: number) => Glyph
  layout: (text: string) => { glyphs: Glyph[], positions: { xAdvance: number, yAdvance: number, xOffset: number, yOffset: number }[], advanceWidth: number }
}
interface Piece { readonly text: string, readonly name: string, readonly width: number }

/** Signs that the fonts lack, by those that say the same. */
const instead: Readonly<Record<string, string>> = { '→': '›', '←': '‹', '≥': '>=', '≤': '<=', '≈': '~', '∆': 'Δ', '⌀': 'Ø', '∅': 'Ø', '\u00a0': ' ', '\u202f': ' ', '\t': ' ' }

const pointsOf = (size: PaperSize): readonly [number, number] => size === 'A4' ? [595.28, 841.89] : size === 'Letter' ? [612, 792] : [size.width, size.height]

export class Paper {
  readonly width: number
  readonly height: number
  private readonly document: PDFKit.PDFDocument
  private readonly fonts = new Map<string, Font>()
  private readonly signs: Readonly<Record<Face, Map<string, readonly Piece[]>>> = { 'sans': new Map(), 'sans-bold': new Map(), 'mono': new Map(), 'mono-bold': new Map() }
  private readonly chunks: Buffer[] = []
  private pages = 0

  /** `kept`: whether pages can be turned back to; without it each is written out when the next begins. */
  constructor(size: PaperSize, { title, at, kept = true }: { readonly title: string, readonly at: string, readonly kept?: boolean }) {
    [this.width, this.height] = pointsOf(size)
    this.document = new PDFDocument({
      size: [this.width, this.height], margin: 0, autoFirstPage: false, bufferPages: kept, lang: 'en', pdfVersion: '1.7',
      // Without a font of its own the writer would read one that is not shipped; its types do not say that null is allowed.
      font: null as unknown as string,
      info: { Title: title, Creator: 'Witnessmark', Producer: 'Witnessmark', CreationDate: new Date(at) },
    })
    this.document.on('data', (chunk: Buffer) => this.chunks.push(chunk))
  }

  /** How many pages there are so far. */
  get pageCount(): number {
    return this.pages
  }

  addPage(): void {
    this.document.addPage()
    this.pages += 1
  }

  /** Back to a page written before, counted from 0. */
  turnTo(page: number): void {
    this.document.switchToPage(page)
  }

  widthOf(text: string, { face = 'sans', size = 8.5 }: TextStyle = {}): number {
    return this.pieces(text, face).reduce((sum, piece) => sum + piece.width, 0) * size
  }

  /** Writes one line; `x` is its left end, its right end or its middle as `align` says. Answers the x behind it. */
  text(text: string, x: number, baseline: number, style: TextStyle = {}): number {
    const { face = 'sans', size = 8.5, align = 'left', colour = '#000' } = style
    const pieces = this.pieces(text, face)
    const whole = align === 'left' ? 0 : pieces.reduce((sum, piece) => sum + piece.width, 0) * size
    let at = align === 'right' ? x - whole : align === 'center' ? x - whole / 2 : x
    this.document.fillColor(colour)
    for (const piece of pieces) {
      this.document.font(piece.name).fontSize(size).text(piece.text, at, baseline, { lineBreak: false, baseline: 'alphabetic' })
      at += piece.width * size
    }
    return at
  }

  /** The text cut into lines that fit the width, at spaces; a word that is longer by itself is cut at its hyphens, else within. */
  lines(text: string, width: number, style: TextStyle = {}): string[] {
    const lines: string[] = []
    let line = ''
    for (const word of text.split(/\s+/).flatMap(each => this.cutWord(each, width, style))) {
      const longer = line === '' ? word : `${line} ${word}`
      if (line !== '' && this.widthOf(longer, style) > width) {
        lines.push(line)
        line = word
      }
      else {
        line = longer
      }
    }
    return line === '' ? lines : [...lines, line]
  }

  private cutWord(word: string, width: number, style: TextStyle): string[] {
    if (this.widthOf(word, style) <= width) return [word]
    const parts = word.split(/(?<=[-/_])/)
    return packed(parts.length > 1 ? parts.flatMap(part => this.cutWord(part, width, style)) : [...word], part => this.widthOf(part, style) <= width)
  }

  /** At most so many lines; the last of those that are left ends in three dots where there were more. */
  linesOf(text: string, width: number, most: number, style: TextStyle = {}): string[] {
    const all = this.lines(text, width, style)
    if (all.length <= most) return all
    const cut = [...all[most - 1] ?? '']
    while (cut.length > 0 && this.widthOf(`${cut.join('')}…`, style) > width) cut.pop()
    return [...all.slice(0, most - 1), `${cut.join('').trimEnd()}…`]
  }

  line(x1: number, y1: number, x2: number, y2: number, { weight = 0.4, colour = '#000', dash = 0 }: { readonly weight?: number, readonly colour?: string, readonly dash?: number } = {}): void {
    this.stroke(weight, colour, dash, () => this.document.moveTo(x1, y1).lineTo(x2, y2))
  }

  frame(x: number, y: number, width: number, height: number, { weight = 0.8, colour = '#000', dash = 0 }: { readonly weight?: number, readonly colour?: string, readonly dash?: number } = {}): void {
    this.stroke(weight, colour, dash, () => this.document.rect(x, y, width, height))
  }

  private stroke(weight: number, colour: string, dash: number, draw: () => void): void {
    this.document.lineWidth(weight).strokeColor(colour)
    if (dash > 0) this.document.dash(dash, { space: dash })
    else this.document.undash()
    draw()
    this.document.stroke()
  }

  fill(x: number, y: number, width: number, height: number, colour = '#000'): void {
    this.document.rect(x, y, width, height).fill(colour)
  }

  triangle(x: number, y: number, width: number, height: number): void {
    this.document.moveTo(x + width / 2, y).lineTo(x + width, y + height).lineTo(x, y + height).fill('#000')
  }

  /** A path in the commands of SVG, in units of a picture whose corner stands at (x, y); filled where no weight is given. */
  path(d: string, { x, y, scale, weight, dash = 0 }: Picture & { readonly weight?: number, readonly dash?: number }): void {
    if (d === '') return
    this.document.save().translate(x, y).scale(scale)
    this.document.path(d)
    if (weight === undefined) this.document.fill('#000')
    else this.stroke(weight / scale, '#000', dash / scale, () => undefined)
    this.document.restore()
  }

  /** A ring, white within. */
  ring(x: number, y: number, radius: number, weight: number): void {
    this.document.circle(x, y, radius).lineWidth(weight).undash().fillAndStroke('#fff', '#000')
  }

  /** Slanting lines within a rectangle. */
  hatch(x: number, y: number, width: number, height: number, apart: number): void {
    this.document.save()
    this.document.rect(x, y, width, height).clip()
    for (let from = x - height; from < x + width; from += apart) this.line(from, y + height, from + height, y, { weight: 0.4 })
    this.document.restore()
  }

  /** What was written out since the last time; the next `taken` or `bytes` goes on behind it. */
  taken(): Buffer {
    return Buffer.concat(this.chunks.splice(0))
  }

  /** Closes it; nothing can be written afterwards. */
  bytes(): Promise<Buffer> {
    return new Promise((resolve, reject) => {
      this.document.on('end', () => resolve(Buffer.concat(this.chunks)))
      this.document.on('error', reject)
      this.document.end()
    })
  }

  /** Cuts a text where the font changes; widths are in units of the size. */
  private pieces(text: string, face: Face): Piece[] {
    const pieces: { text: string, name: string, width: number }[] = []
    for (const sign of text) {
      for (const each of this.signOf(sign, face)) {
        const last = pieces.at(-1)
        if (last?.name === each.name) {
          last.text += each.text
          last.width += each.width
        }
        else {
          pieces.push({ ...each })
        }
      }
    }
    return pieces
  }

  /** What stands for a sign: looked up once a face, since a page has some thousands of them. */
  private signOf(sign: string, face: Face): readonly Piece[] {
    const known = this.signs[face].get(sign)
    if (known !== undefined) return known
    const pieces = [...instead[sign] ?? sign].flatMap((shown) => {
      const found = this.fontOf(shown, face)
      const parts = found === undefined ? [...codePoint(shown)].map(one => [one, this.nameOf(face, 'latin')] as const) : [[shown, found] as const]
      return parts.map(([text, name]) => ({ text, name, width: this.advance(name, text) }))
    })
    this.signs[face].set(sign, pieces)
    return pieces
  }

  private advance(name: string, sign: string): number {
    const font = this.fonts.get(name)
    return font ? font.glyphForCodePoint(sign.codePointAt(0) ?? 0).advanceWidth / font.unitsPerEm : 0
  }

  private fontOf(sign: string, face: Face): string | undefined {
    const code = sign.codePointAt(0) ?? 0
    for (const script of scriptsOf(face)) {
      const name = this.nameOf(face, script)
      if (this.fonts.get(name)?.hasGlyphForCodePoint(code)) return name
    }
    return undefined
  }

  private nameOf(face: Face, script: Script): string {
    const name = `${face} ${script}`
    if (!this.fonts.has(name)) {
      this.document.registerFont(name, fontFile(face, script))
      this.document.font(name)
      // The writer keeps its font under a name that its types do not show.
      const { font } = (this.document as unknown as { _font: { font: Font } })._font
      font.layout = text => plainLayout(font, text)
      this.fonts.set(name, font)
    }
    return name
  }
}

/** Parts put together again as far as they fit. */
function packed(parts: readonly string[], fits: (part: string) => boolean): string[] {
  const whole: string[] = []
  for (const part of parts) {
    const last = whole.at(-1)
    if (last !== undefined && fits(last + part)) whole[whole.length - 1] = last + part
    else whole.push(part)
  }
  return whole
}

const codePoint = (sign: string) => `U+${(sign.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`

/**
 * A glyph a sign, one after the other. The shaping of the library would draw `--` and `->` of a serial as one sign, and takes a
 * millisecond a line; 2,000 rows are 10,000 lines.
 */
function plainLayout(font: Font, text: string): ReturnType<Font['layout']> {
  const glyphs = Array.from(text, sign => font.glyphForCodePoint(sign.codePointAt(0) ?? 0))
  const positions = glyphs.map(({ advanceWidth }) => ({ xAdvance: advanceWidth, yAdvance: 0, xOffset: 0, yOffset: 0 }))
  return { glyphs, positions, advanceWidth: glyphs.reduce((sum, glyph) => sum + glyph.advanceWidth, 0) }
}
