import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isNumberText } from '../../../../../shared/units/number'
import { readEntryFile } from '../../../../../shared/settings/entry-table/read-entry'
import { entryTableFaults } from '../../../../../shared/settings/entry-table/faults'
import { writeEntryCsv } from '../../../../../shared/settings/entry-table/write-entry'
import type { Content, ExtraValue, SettingsFile } from '../../../../../shared/settings/types'
import { arbitraryContent } from '../../../../support/arbitrary-content'
import { liftFile, liftLines, liftPlate, liftTable, wholeTable, withContent } from '../../../../support/entry-table'

const { exportedAt } = liftFile
const again = (file: SettingsFile, plate: Parameters<typeof readEntryFile>[1]) => readEntryFile(new TextEncoder().encode(writeEntryCsv(file, plate)), plate, { exportedAt })

describe('the drive’s own list', () => {
  it('has the drive’s order, numbers, units and words', () => {
    expect(writeEntryCsv(liftFile, liftPlate)).toBe(liftLines.map(line => `${line}\r\n`).join(''))
  })

  it('has the drive’s word for what is not set, and no line where it has none', () => {
    const table = { ...liftTable, parameters: liftTable.parameters.map(entry => entry.number === 'K-003' ? { ...entry, none: '---' } : entry) }
    const { softLimitMin: _min, softLimitMax: _max, ...setup } = liftFile.setup
    const lines = writeEntryCsv({ ...liftFile, setup }, { ...liftPlate, entryTable: table }).split('\r\n')
    expect(lines).toContain('K-003;Soft limit min;---;mm')
    expect(lines.some(line => line.startsWith('K-004'))).toBe(false)
  })

  it.each([
    ['down, towards 0', 253.9, '0,250'], ['on the step', 255, '0,255'],
  ])('rounds a limit %s', (_, speedLimit, expected) => {
    expect(writeEntryCsv({ ...liftFile, setup: { speedLimit } }, liftPlate)).toContain(`K-012;Speed limit;${expected};m/s`)
  })

  it('puts each cell into its column, and quotes what would read as two', () => {
    const parameters = [{ number: 'N;1', name: 'a "b"', field: 'unit:firmware' }, { number: '2', name: ' led', field: 'file:note' }, { number: '3', field: 'softLimitMax' }]
    const table = { ...liftTable, header: ['h'], columns: { number: 3, name: 1, value: 2, unit: 5 }, parameters, zones: [], moves: [] }
    const file: SettingsFile = { ...liftFile, note: 'two\nlines', setup: { softLimitMax: 12.5 }, extra: {} }
    expect(writeEntryCsv(file, { ...liftPlate, entryTable: table })).toBe('h\r\n"a ""b""";1.4;"N;1";;\r\n" led";"two\nlines";2;;\r\n;12,5;3;;mm\r\n')
  })

  it('has neither name nor unit where the list has no column for them', () => {
    const table = { ...liftTable, columns: { number: 1, value: 2, name: 0, unit: 0 }, zones: [], moves: [] }
    const lines = writeEntryCsv(liftFile, { ...liftPlate, entryTable: table }).split('\r\n')
    expect(lines.slice(2, 5)).toEqual(['P-01;LT10-26-0001', 'P-02;1.4', 'K-001;1'])
    expect(lines).toContain('K-050;3')
  })

  it('has the heads of its tables where they are empty, so that a list cut off is told from one without rows', () => {
    const lines = writeEntryCsv({ ...liftFile, zones: [], moves: [] }, liftPlate).split('\r\n')
    expect(lines.slice(-3)).toEqual(['Output;On from;On to', 'Step;Name;Mode;Pos;Vel;Acc;Force;Slow at;Then', ''])
  })

  it('leaves out what the table has no place for', () => {
    const text = writeEntryCsv({ ...liftFile, setup: { ...liftFile.setup, jogSpeed: 77 } }, liftPlate)
    expect(text).not.toMatch(/77/)
  })

  it('cannot be written without an entry table', () => {
    expect(() => writeEntryCsv(liftFile, { model: 'LT20' })).toThrow(expect.objectContaining({ code: 'no-entry-table' }))
  })
})

/** What a list without types can hold: texts that read as texts, keys that no table line begins with. */
function holdable(content: Content, decimal: 'point' | 'comma'): Content {
  const asRead = (text: string) => decimal === 'comma' ? text.replaceAll(',', '.') : text
  const holds = (value: ExtraValue) => typeof value !== 'string' || (value.trim() !== '' && !isNumberText(asRead(value)) && !/^(?:true|TRUE|false|FALSE)$/.test(value))
  const texts = (text: string | undefined) => text !== undefined && text.trim() !== ''
  return {
    ...content,
    extra: Object.fromEntries(Object.entries(content.extra).filter(([key, value]) => !/^#\d+$/.test(key) && holds(value))),
    moves: content.moves.map(({ label, comment, ...move }) => ({ ...move, ...(texts(label) ? { label } : {}), ...(texts(comment) ? { comment } : {}) })),
  }
}

describe('the law: reading what was written gives the content back', () => {
  const layouts = fc.constantFrom({ delimiter: ';', decimal: 'comma' } as const, { delimiter: ',', decimal: 'point' } as const, { delimiter: '\t', decimal: 'point' } as const, { delimiter: ',', decimal: 'comma' } as const)

  it('for any content, by a table with a row for each field', () => {
    fc.assert(fc.property(arbitraryContent(), layouts, (some, layout) => {
      const content = holdable(some, layout.decimal)
      const plate = { model: 'LT10-100', axisKind: content.axisKind, entryTable: wholeTable(content.axisKind, layout) }
      expect(entryTableFaults(plate.entryTable, content.axisKind)).toEqual([])
      const outcome = again(withContent(liftFile, content), plate)
      if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors.slice(0, 3)))
      expect(outcome.value.content).toEqual(content)
      expect(outcome.value.file.unit).toEqual(liftFile.unit)
    }), { numRuns: 150 })
  })

  const onSteps = fc.record({
    softLimitMin: fc.integer({ min: -5000, max: 0 }).map(n => n / 10), softLimitMax: fc.integer({ min: 1, max: 5000 }).map(n => n / 10),
    speedLimit: fc.integer({ min: 0, max: 400 }).map(n => n * 5), inPositionWindow: fc.integer({ min: 0, max: 500 }).map(n => n / 100), brakeFitted: fc.boolean(),
    targets: fc.array(fc.integer({ min: -99999, max: 99999 }).map(n => n / 100), { maxLength: 6 }), acceleration: fc.integer({ min: 1, max: 9000 }),
  })

  it('for values on the table’s steps, by factors, units and digits', () => {
    fc.assert(fc.property(onSteps, ({ targets, acceleration, ...setup }) => {
      const moves = targets.map((target, move) => ({ move, kind: 'relative' as const, target: target + 0, speed: 10, acceleration }))
      const file = { ...liftFile, setup: { ...setup, softLimitMin: setup.softLimitMin + 0 }, moves }
      const outcome = again(file, liftPlate)
      if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors.slice(0, 3)))
      expect(outcome.value.file).toEqual(file)
      expect(outcome.value.normalised.rounded).toBe(0)
    }), { numRuns: 150 })
  })

  it('and what the steps took stays as it is the second time', () => {
    fc.assert(fc.property(fc.double({ min: -400, max: 400, noNaN: true }), fc.double({ min: 0, max: 900, noNaN: true }), (softLimitMin, speedLimit) => {
      const rough = { ...liftFile, setup: { softLimitMin: Math.trunc(softLimitMin * 1e6) / 1e6 + 0, speedLimit: Math.trunc(speedLimit * 1e6) / 1e6 } }
      const first = again(rough, liftPlate)
      const second = first.ok ? again(first.value.file, liftPlate) : first
      expect(second.ok && first.ok && second.value.file).toEqual(first.ok && first.value.file)
    }), { numRuns: 50 })
  })
})
