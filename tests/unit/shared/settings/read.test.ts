import { describe, expect, it } from 'vitest'
import { exampleFiles, leastExample, pressExample } from '../../../../shared/settings/examples'
import { formOf, maxFileBytes, readSettings, readSettingsText } from '../../../../shared/settings/read'
import { writeCsv } from '../../../../shared/settings/write-csv'
import { writeJson } from '../../../../shared/settings/write-json'

const bytes = (text: string) => new TextEncoder().encode(text)
const codes = (sent: Uint8Array) => {
  const outcome = readSettings(sent)
  return outcome.ok ? [] : outcome.errors.map(error => error.code)
}

describe('formOf', () => {
  it.each([
    ['{', 'json'], [' \t\r\n{', 'json'], ['[', 'json'], ['\ufeff{', 'json'], ['section', 'csv'], ['sep=;', 'csv'], ['"section"', 'csv'], ['', 'csv'], ['5', 'csv'], ['\ufeffsection', 'csv'], ['<xml', 'csv'],
  ])('of %j is %s', (text, form) => expect(formOf(bytes(text))).toBe(form))

  it('sees through UTF-16', () => {
    expect(formOf(Uint8Array.from([0xff, 0xfe, 0x7b, 0]))).toBe('json')
    expect(formOf(Uint8Array.from([0xfe, 0xff, 0, 0x7b]))).toBe('json')
    expect(formOf(Uint8Array.from([0x73, 0]))).toBe('csv')
  })
})

describe('formOf, where bytes only look like a mark', () => {
  it('takes no single byte of a mark for the mark', () => {
    expect(formOf(Uint8Array.from([0x5b, 0xbb, 0x41, 0x41]))).toBe('json')
    expect(formOf(Uint8Array.from([0xef, 0x41, 0x41, 0x7b]))).toBe('csv')
    expect(formOf(Uint8Array.from([0xef, 0xbb, 0x41, 0x7b]))).toBe('csv')
    expect(formOf(Uint8Array.from([0xff, 0x41, 0x7b]))).toBe('csv')
    expect(formOf(Uint8Array.from([0xfe, 0x41, 0x7b]))).toBe('csv')
  })

  it('passes over no more than the blanks of JSON and the zero bytes of UTF-16', () => {
    expect(formOf(Uint8Array.from([0, 0x20, 0, 0x0a, 0, 0x7b]))).toBe('json')
    for (const byte of [0x0b, 0x0c, 0xa0, 0x01]) expect(formOf(Uint8Array.from([byte, 0x7b]))).toBe('csv')
  })
})

describe('readSettings', () => {
  it('reads both forms of one file to the same', () => {
    for (const file of exampleFiles) {
      const json = readSettings(bytes(writeJson(file)))
      const csv = readSettings(bytes(writeCsv(file)))
      expect(json.ok && json.value.file).toEqual(file)
      expect(csv.ok && csv.value.file).toEqual(file)
      expect(json.ok && json.value.content).toEqual(csv.ok && csv.value.content)
    }
  })

  it('passes the decimal sign on', () => {
    const text = writeCsv(pressExample).replaceAll(',', ';').replace(/(\d)\.(\d)/g, '$1.$2')
    const unclear = text.split('\r\n').filter(line => /^(file|unit);/.test(line) || line.startsWith('section')).join('\n') + '\nsetup;;softLimitMax;1.500;mm\n'
    const ask = (decimal?: 'point' | 'comma') => {
      const outcome = readSettings(bytes(unclear), decimal ? { decimal } : {})
      return outcome.ok ? outcome.value.content.setup.softLimitMax : outcome.errors.map(error => error.code)
    }
    expect(ask('point')).toBe(1.5)
    expect(ask()).toEqual(['number-unclear'])
    expect(ask('comma')).toEqual(['number-unclear'])
  })

  it('reads 2 MiB and not a byte more', () => {
    const full = writeJson(leastExample)
    expect(codes(bytes(full.padEnd(maxFileBytes, ' ')))).toEqual([])
    const outcome = readSettings(bytes(full.padEnd(maxFileBytes + 1, ' ')))
    expect(outcome).toEqual({ ok: false, more: 0, errors: [{ at: '', code: 'limit', value: '2097153', message: 'The file has 2097153 bytes; at most 2097152 are read.' }] })
  })

  it('is quick to refuse the worst of 2 MiB', () => {
    const worst = [
      `{${Array.from({ length: 250_000 }, (_, index) => `"k${index}":1`).join(',')}}`.slice(0, maxFileBytes), `{"extra":{${Array.from({ length: 250_000 }, () => '"a":1').join(',')}}}`,
      `{"setup":{${Array.from({ length: 90_000 }, (_, index) => `"softLimit${index}":1`).join(',')}}}`, '['.repeat(maxFileBytes),
      `section,row,field,value,unit\n${'setup,,softLimit,1,mm\n'.repeat(90_000)}`, `section,row,field,value,unit\n${'zones,1,from,1,mm\n'.repeat(100_000)}`, `section;row;field;value;unit\n${'move;1;target;1,5;mm\nmove;1;speed;1.5;mm\n'.repeat(50_000)}`,
      `section,row,field,value,unit\nfile,,note,"${'"",'.repeat(600_000)}`, '\n'.repeat(maxFileBytes), 's'.repeat(maxFileBytes), `"${'\\'.repeat(maxFileBytes - 1)}`,
    ]
    for (const text of worst) {
      const start = process.cpuUsage()
      expect(codes(bytes(text).subarray(0, maxFileBytes)).length, text.slice(0, 40)).toBeGreaterThan(0)
      // Linear work takes well under a second; anything that grows with the square takes minutes.
      const { user, system } = process.cpuUsage(start)
      expect((user + system) / 1000, text.slice(0, 40)).toBeLessThan(5000)
    }
  }, 60_000)
})

describe('bytes in no encoding', () => {
  it('are one problem, with the place of the first of them', () => {
    const sent = bytes(writeJson(pressExample))
    const spoilt = sent.with(sent.indexOf(0x0a) + 5, 0xff)
    expect(readSettings(spoilt)).toMatchObject({ ok: false, more: 0, errors: [{ at: '', code: 'encoding', line: 2, column: 5 }] })
  })

  it('are told of in a CSV file too: five bytes that Windows-1252 has no sign for', () => {
    for (const byte of [0x81, 0x8d, 0x8f, 0x90, 0x9d]) {
      const sent = Uint8Array.from([...bytes('section,row,field,value,unit\nfile,,note,'), byte])
      expect(readSettings(sent)).toMatchObject({ ok: false, more: 0, errors: [{ code: 'encoding', line: 2, column: 12 }] })
    }
  })
})

describe('readSettingsText', () => {
  it('passes a mark at the beginning over', () => {
    const outcome = readSettingsText(`\ufeff${writeJson(pressExample)}`)
    expect(outcome.ok && outcome.value.file).toEqual(pressExample)
  })

  it('refuses a lone surrogate as the character that UTF-8 makes of it', () => {
    const outcome = readSettingsText(writeJson(pressExample).replace('lid gasket', 'lid \\ud83d'))
    expect(!outcome.ok && outcome.errors).toMatchObject([{ code: 'text-character', at: '/note' }])
  })
})
