import { readFileSync, readdirSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bareCell, cellRange, csvRecords } from '../../../../shared/settings/csv-records'

const cellsOf = (text: string, delimiter = ',') => {
  const found = csvRecords(text, delimiter, 0)
  return found.ok ? found.records.map(record => record.cells) : `fault ${found.offset}`
}
const withoutEmpty = (records: ReturnType<typeof cellsOf>) => typeof records === 'string' ? records : records.filter(cells => cells.some(cell => cell !== ''))

describe('records', () => {
  // RFC 4180, section 2, rules 1, 2, 5, 6 and 7, with LF for CR LF as the reader makes it before.
  it.each([
    ['aaa,bbb,ccc\nzzz,yyy,xxx\n', [['aaa', 'bbb', 'ccc'], ['zzz', 'yyy', 'xxx']]],
    ['aaa,bbb,ccc\nzzz,yyy,xxx', [['aaa', 'bbb', 'ccc'], ['zzz', 'yyy', 'xxx']]],
    ['"aaa","bbb","ccc"\nzzz,yyy,xxx', [['aaa', 'bbb', 'ccc'], ['zzz', 'yyy', 'xxx']]],
    ['"aaa","b\nbb","ccc"\nzzz,yyy,xxx', [['aaa', 'b\nbb', 'ccc'], ['zzz', 'yyy', 'xxx']]],
    ['"aaa","b""bb","ccc"', [['aaa', 'b"bb', 'ccc']]],
  ])('of %j', (text, records) => expect(withoutEmpty(cellsOf(text))).toEqual(records))

  // RFC 4180, section 2, rule 4: spaces belong to the cell.
  it('keep spaces', () => expect(cellsOf(' a ,b ')).toEqual([[' a ', 'b ']]))

  it.each([
    ['a"b,c', 1], ['a,b"', 3], ['"a"b,c', 3], ['"a" ,b', 3], ['"a', 0], ['x\n"a\nb', 2], ['"a""', 0], ['"a"""b', 5], ['a,"b""', 2], [' "a"', 1],
  ])('of %j: a quote is out of place at %d', (text, offset) => expect(cellsOf(text)).toBe(`fault ${offset}`))

  it.each([['""', ['']], ['"",""', ['', '']], ['""""', ['"']], ['"a,b"', ['a,b']], ['"a\n\nb"', ['a\n\nb']]])('of %j', (text, cells) => expect(cellsOf(text)).toEqual([cells]))
})

describe('csv-spectrum 2.0.0', () => {
  // location_coordinates is not valid UTF-8 and is a test for decoding, not for records.
  const folder = dirname(createRequire(import.meta.url).resolve('csv-spectrum'))
  const names = readdirSync(join(folder, 'csvs')).map(file => file.replace('.csv', '')).filter(name => name !== 'location_coordinates')

  it('is there', () => expect(names.length).toBe(11))

  for (const name of names) {
    it(name, () => {
      const text = readFileSync(join(folder, 'csvs', `${name}.csv`), 'utf8').replace(/\r\n?/g, '\n')
      const [header = [], ...rows] = cellsOf(text) as string[][]
      const records = rows.filter(cells => cells.length === header.length).map(cells => Object.fromEntries(header.map((key, index) => [key, cells[index]])))
      const expected = JSON.parse(readFileSync(join(folder, 'json', `${name}.json`), 'utf8').replaceAll('\\r\\n', '\\n')) as unknown
      expect(records).toEqual(expected)
    })
  }
})

describe('any table', () => {
  const cell = fc.string({ unit: fc.constantFrom('a', 'ß', '"', ',', ';', '\n', ' ', '\'', '1'), maxLength: 5 })
  const table = fc.integer({ min: 2, max: 5 }).chain(width => fc.array(fc.array(cell, { minLength: width, maxLength: width }), { minLength: 1, maxLength: 5 }))
  const written = (text: string) => /["\n,;]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text

  it.each([',', ';', '\t'])('written with %j is read again', (delimiter) => {
    fc.assert(fc.property(table, (rows) => {
      expect(cellsOf(rows.map(cells => cells.map(written).join(delimiter)).join('\n'), delimiter)).toEqual(rows)
    }), { numRuns: 500 })
  })

  it('has each record and cell where it is said to be', () => {
    fc.assert(fc.property(table, (rows) => {
      const text = `head\n${rows.map(cells => cells.map(written).join(',')).join('\n')}`
      const found = csvRecords(text, ',', 5)
      if (!found.ok) return false
      found.records.forEach(({ cells, offset }) => cells.forEach((each, index) => {
        const { start, end } = cellRange(text, ',', offset, index)
        expect(bareCell(text.slice(start, end))).toBe(each)
      }))
      return found.records.length === rows.length
    }), { numRuns: 500 })
  })
})

describe('cellRange', () => {
  it('ends with the record where it has no such cell', () => {
    expect(cellRange('a,b\nc', ',', 0, 4)).toEqual({ start: 2, end: 3 })
    expect(cellRange('a,b', ',', 0, 4)).toEqual({ start: 2, end: 3 })
  })
})

describe('bareCell', () => {
  it.each([['a', 'a'], ['"a"', 'a'], ['"a""b"', 'a"b'], ['""', ''], ['', '']])('of %s is %s', (cell, text) => expect(bareCell(cell)).toBe(text))
})
