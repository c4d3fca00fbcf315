import Papa from 'papaparse'
import { describe, expect, it } from 'vitest'
import { exampleFiles, leastExample, pressExample } from '../../../../shared/settings/examples'
import { csvHeader, writeCsv } from '../../../../shared/settings/write-csv'

const linesOf = (text: string) => text.split('\r\n')

describe('writeCsv', () => {
  it('writes the least file line by line', () => {
    expect(writeCsv(leastExample)).toBe([
      'section,row,field,value,unit', 'file,,schema,witnessmark.axis-settings/1,', 'file,,exportedAt,2026-11-30T10:00:00Z,', 'file,,axisKind,linear,',
      'unit,,serial,HL25-0005,', 'unit,,model,HL25-100,', '',
    ].join('\r\n'))
  })

  it('writes units out, and `text` beside each text of the drive’s own', () => {
    const lines = linesOf(writeCsv(pressExample))
    for (const line of ['setup,,softLimitMax,180,mm', 'setup,,quickStopDeceleration,6000,mm/s²', 'setup,,velocityGain,1850,', 'setup,,brakeFitted,true,', 'setup,,homingMethod,hard-stop,', 'zone,2,from,140,mm',
      'move,2,forceLimit,38,%', 'move,3,next,0,', 'move,3,dwell,150,ms', 'extra,,K-017,15,', 'extra,,Recipe,007,text', 'extra,,Ramp,3,counts', 'extra,,Buzzer,false,', 'reading,,boardTemperature,41.5,°C']) {
      expect(lines).toContain(line)
    }
  })

  it('is RFC 4180: five cells a record, as another parser reads them', () => {
    for (const file of exampleFiles) {
      const { data, errors } = Papa.parse<string[]>(writeCsv(file).trimEnd(), { delimiter: ',' })
      expect(errors).toEqual([])
      expect(data[0]).toEqual([...csvHeader])
      expect(data.every(cells => cells.length === 5)).toBe(true)
    }
  })

  it('puts cells in quotes that need them', () => {
    const text = writeCsv({ ...leastExample, note: 'a,b "c"\nd', extra: { K: ' x' } })
    expect(text).toContain('file,,note,"a,b ""c""\nd",\r\n')
    expect(text).toContain('extra,,K," x",text\r\n')
  })

  it('leaves no cell that a spreadsheet takes for a formula, numbers aside', () => {
    const hostile = ['=1+2', '+1', '-x', '@a', '\'=1', '＝1', '=cmd|\' /C calc\'!A0']
    const extra = Object.fromEntries(hostile.map(text => [text, text]))
    const { data } = Papa.parse<string[]>(writeCsv({ ...leastExample, unit: { ...leastExample.unit, model: '=model' }, note: '@note', extra: { ...extra, unit: { value: -5, unit: '=unit' } } }).trimEnd())
    const formulas = data.flat().filter(cell => /^[=+\-@\t\r＝＋－＠]/.test(cell))
    expect(formulas).toEqual(['-5'])
    expect(data.flat()).toContain('\'=unit')
    expect(data.flat()).toContain('\'\'=1')
  })
})
