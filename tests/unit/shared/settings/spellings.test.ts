import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { readSettings, type ReadOptions } from '../../../../shared/settings/read'
import type { Normalised, ReadOutcome } from '../../../../shared/settings/types'

/*
 * One content in every spelling that a drive tool, a script or a spreadsheet gives it: encodings × delimiters × decimal
 * signs × line ends. The content is the same, and the receipt says how the file was spelt.
 */

const text = readFileSync(new URL('../../../../fixtures/settings/csv/press.csv', import.meta.url), 'utf8')
/** The note of the file has two lines; without it each line is a record. */
const records = text.replace(/\nfile,,note,"[^"]*",/, '').trimEnd().split('\n').map(line => line.split(','))
const numeric = (cells: readonly string[]) => /^(setup|zone|move|extra|reading)$/.test(cells[0] ?? '') && cells[4] !== 'text' && /^-?\d/.test(cells[3] ?? '')

const encodings: Readonly<Record<Normalised['encoding'], (text: string) => Uint8Array>> = {
  'utf-8': text => new TextEncoder().encode(text),
  'utf-8-bom': text => Uint8Array.from([0xef, 0xbb, 0xbf, ...new TextEncoder().encode(text)]),
  'utf-16le': text => Uint8Array.from([0xff, 0xfe, ...Buffer.from(text, 'utf16le')]),
  'utf-16be': text => Uint8Array.from([0xfe, 0xff, ...Buffer.from(text, 'utf16le').swap16()]),
  'windows-1252': text => Uint8Array.from(text, sign => sign.charCodeAt(0)),
}
interface Spelling { readonly encoding: Normalised['encoding'], readonly delimiter: ',' | ';' | '\t', readonly decimal: 'point' | 'comma', readonly end: string, readonly quoted: boolean }
const spellings: Spelling[] = (Object.keys(encodings) as Normalised['encoding'][]).flatMap(encoding => ([',', ';', '\t'] as const).flatMap(delimiter => (['point', 'comma'] as const)
  .filter(decimal => !(delimiter === ',' && decimal === 'comma')).flatMap(decimal => ['\n', '\r\n', '\r'].flatMap(end => [false, true].map(quoted => ({ encoding, delimiter, decimal, end, quoted }))))))

function spelt({ encoding, delimiter, decimal, end, quoted }: Spelling, change: (cells: readonly string[]) => readonly string[] = cells => cells): Uint8Array {
  const cell = (value: string, cells: readonly string[], index: number) => {
    const signed = decimal === 'comma' && index === 3 && numeric(cells) ? value.replace('.', ',') : value
    return quoted ? `"${signed}"` : signed
  }
  return encodings[encoding](records.map((cells) => {
    const changed = change(cells)
    return changed.map((value, index) => cell(value, changed, index)).join(delimiter)
  }).join(end) + end)
}
const read = (bytes: Uint8Array, options?: ReadOptions) => readSettings(bytes, options)
const contentOf = (outcome: ReadOutcome) => outcome.ok ? outcome.value.content : outcome.errors

describe('one content in every spelling', () => {
  const expected = contentOf(read(new TextEncoder().encode(text)))

  it(`${spellings.length} of them are one content, and each receipt says which it was`, () => {
    expect(expected).toMatchObject({ setup: { homeOffset: 2.35 }, moves: [{ move: 0 }, { move: 2, approach: 150.5 }, { move: 5 }] })
    for (const spelling of spellings) {
      const outcome = read(spelt(spelling))
      expect(contentOf(outcome), JSON.stringify(spelling)).toEqual(expected)
      if (outcome.ok) expect(outcome.value.normalised).toMatchObject({ form: 'csv', encoding: spelling.encoding, delimiter: spelling.delimiter, decimal: spelling.decimal, rounded: 0, converted: 0 })
    }
  })

  it('is one content with the four cells that a line without a unit needs, and with empty cells behind the fifth', () => {
    for (const [delimiter, decimal] of [[',', 'point'], [';', 'comma'], ['\t', 'comma']] as const) {
      const spelling = { encoding: 'utf-8', delimiter, decimal, end: '\n', quoted: false } as const
      const short = (cells: readonly string[]) => cells[0] === 'section' ? cells : cells[4] === '' ? cells.slice(0, 4) : [...cells, '', '']
      expect(contentOf(read(spelt(spelling, short)))).toEqual(expected)
    }
  })

  it('is one content below a line that names the delimiter, with a header in capitals and blanks', () => {
    for (const delimiter of [',', ';', '\t']) {
      const header = ['Section', ' ROW', 'Field ', 'VALUE', ' unit '].join(delimiter)
      const lines = records.slice(1).map(cells => cells.join(delimiter)).join('\n')
      expect(contentOf(read(new TextEncoder().encode(`sep=${delimiter}\n${header}\n${lines}`)))).toEqual(expected)
    }
  })

  it('is one content whatever the order of its lines, with empty lines between them', () => {
    const [header = [], ...rest] = records
    for (const order of [[...rest].reverse(), [...rest].sort((a, b) => (a[3] ?? '') < (b[3] ?? '') ? -1 : 1)]) {
      expect(contentOf(read(new TextEncoder().encode([header, ...order].map(cells => cells.join(';')).join('\n\n'))))).toEqual(expected)
    }
  })
})

describe('decimal signs', () => {
  const semicolon = { encoding: 'utf-8', delimiter: ';', decimal: 'comma', end: '\n', quoted: false } as const
  /** The approach of move 2 written so; the home offset of 2,35 mm proves the comma. */
  const withComma = (cells: readonly string[]) => numeric(cells) ? cells.map((cell, index) => index === 3 ? cell.replace('.', ',') : cell) : cells
  const approach = (value: string) => read(spelt({ ...semicolon, decimal: 'point' }, cells => cells[2] === 'approach' ? [...cells.slice(0, 3), value, 'mm'] : withComma(cells)))
  const line = records.findIndex(cells => cells[2] === 'approach') + 1

  it('a cell with the other sign is refused at its place, where the file has one sign elsewhere', () => {
    expect(approach('150.5')).toMatchObject({ ok: false, errors: [{ code: 'decimal-mixed', at: '' }] })
    // Alone it could be a group of thousands or a part: with commas elsewhere it is neither read nor guessed.
    expect(approach('1.500')).toMatchObject({ ok: false, errors: [{ code: 'number-unclear', at: '/moves/1/approach', line, value: '1.500' }] })
  })

  it('a file that shows none is asked for it, once a cell, and read as it is told', () => {
    const unclear = (options?: ReadOptions) => read(spelt({ ...semicolon, decimal: 'point' }, cells => numeric(cells) ? [...cells.slice(0, 3), '1.500', cells[4] ?? ''] : cells), options)
    const asked = unclear()
    expect(asked.ok).toBe(false)
    if (!asked.ok) expect(new Set(asked.errors.map(({ code }) => code))).toEqual(new Set(['number-unclear']))
    // Read with a point 1.500 is 1.5, which no whole row number or count may be; a zone from 1.5 to 1.5 has no width.
    const told = unclear({ decimal: 'point' })
    if (!told.ok) expect(told.errors.map(({ code }) => code)).not.toContain('number-unclear')
  })

  it('in a file with commas between its cells a quoted comma in a number is unclear, with both readings', () => {
    const outcome = read(spelt({ ...semicolon, delimiter: ',', decimal: 'point', quoted: true }, cells => cells[2] === 'homeOffset' ? [...cells.slice(0, 3), '2,35', 'mm'] : cells))
    expect(outcome).toMatchObject({ ok: false, errors: [{ code: 'number-unclear', at: '/setup/homeOffset', line: records.findIndex(cells => cells[2] === 'homeOffset') + 1, value: '2,35' }] })
    if (!outcome.ok) expect(outcome.errors[0]?.message).toMatch(/2\.35.*235|235.*2\.35/)
  })

  it('the drive’s own texts are no numbers: a comma in them proves nothing', () => {
    const outcome = read(spelt({ ...semicolon, decimal: 'point' }, cells => cells[2] === 'Recipe' ? ['extra', '', 'Recipe', '0,07', 'text'] : cells))
    expect(outcome).toMatchObject({ ok: true, value: { normalised: { decimal: 'point' }, content: { extra: { Recipe: '0,07' } } } })
  })
})

describe('Windows-1252', () => {
  it('lists the texts that were read so, since another code page would have other letters', () => {
    const bytes = spelt({ encoding: 'windows-1252', delimiter: ',', decimal: 'point', end: '\n', quoted: false }, cells => cells[2] === 'label' ? [...cells.slice(0, 3), `${cells[3] ?? ''} ä`, ''] : cells)
    const outcome = read(bytes)
    expect(outcome).toMatchObject({ ok: true, value: { normalised: { encoding: 'windows-1252' } } })
    if (outcome.ok) expect(outcome.value.normalised.decodedTexts).toEqual(expect.arrayContaining(['up ä', 'press ä']))
  })

  it.each([0x81, 0x8d, 0x8f, 0x90, 0x9d])('has no sign at %d: such a file is of no encoding that is read', (byte) => {
    const bytes = spelt({ encoding: 'windows-1252', delimiter: ',', decimal: 'point', end: '\n', quoted: false })
    const at = bytes.indexOf(0xb2)
    bytes[at] = byte
    expect(at).toBeGreaterThan(0)
    expect(read(bytes)).toMatchObject({ ok: false, errors: [{ code: 'encoding', line: records.findIndex(cells => cells[4]?.includes('²')) + 1 }] })
  })
})
