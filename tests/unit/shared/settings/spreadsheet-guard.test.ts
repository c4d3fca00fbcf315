import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { guard, unguard } from '../../../../shared/settings/spreadsheet-guard'

describe('guard', () => {
  // OWASP, "CSV Injection": = + - @ tab carriage return at the beginning; the wide forms are ours.
  it.each([
    ['=1+2', '\'=1+2'], ['+1+2', '\'+1+2'], ['-1+2', '\'-1+2'], ['@SUM(A1)', '\'@SUM(A1)'], ['\t=1', '\'\t=1'], ['\r', '\'\r'],
    ['＝1', '\'＝1'], ['＋1', '\'＋1'], ['－1', '\'－1'], ['＠1', '\'＠1'], ['=HYPERLINK("http://x.invalid")', '\'=HYPERLINK("http://x.invalid")'],
    ['-', '\'-'], ['-12,5', '\'-12,5'], ['+12.5', '\'+12.5'], ['-01', '\'-01'], ['\'=1', '\'\'=1'], ['\'\'=1', '\'\'\'=1'],
  ])('%j is written %j', (text, cell) => expect(guard(text)).toBe(cell))

  it.each(['-12.5', '-0', '-1e-5', '12', '', 'up', '\'tis', '\'', '\'\'', 'a=b', ' =1', '"=1"', '\'-12.5'.slice(1)])('%j is written as it is', text => expect(guard(text)).toBe(text))

  it('leaves no cell that begins with a formula sign and is no number', () => {
    fc.assert(fc.property(hostile, (text) => {
      const cell = guard(text)
      return !/^[=+\-@\t\r＝＋－＠]/.test(cell) || /^-\d/.test(cell)
    }))
  })
})

const hostile = fc.string({ unit: fc.constantFrom('=', '+', '-', '@', '\t', '\'', '1', '.', 'a', ' ', '＝'), maxLength: 6 })

describe('unguard', () => {
  it('undoes guard on any text', () => {
    fc.assert(fc.property(fc.oneof(hostile, fc.string({ unit: 'binary' })), text => unguard(guard(text)) === text), { numRuns: 1000 })
  })

  it.each([['\'tis', '\'tis'], ['\'=1', '=1'], ['\'\'=1', '\'=1'], ['\'-5', '\'-5'], ['\'', '\''], ['=1', '=1']])('reads %j as %j', (cell, text) => expect(unguard(cell)).toBe(text))
})
