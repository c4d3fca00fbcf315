import { applyPatch } from 'diff'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { textDifference } from '../../../../shared/diff/text'
import { writeCsv } from '../../../../shared/settings/write-csv'
import { schemaName, type Content } from '../../../../shared/settings/types'
import { arbitraryPair } from '../../../support/arbitrary-content'

const header = 'section,row,field,value,unit'
const csv = (...lines: string[]) => [header, ...lines, ''].join('\r\n')
const csvOf = (content: Content) => writeCsv({ ...content, schema: schemaName, unit: { serial: 'S1', model: 'HL40-200V' }, exportedAt: '2026-11-30T08:15:00+01:00', readings: {} })
const lead = (before: string, after: string) => applyPatch(before, textDifference(before, after))

describe('the text difference', () => {
  it('shows the lines that differ with three around them', () => {
    const lines = ['setup,,a,1,', 'setup,,b,2,', 'setup,,c,3,', 'setup,,thrustLimit,38,%', 'setup,,d,4,', 'setup,,e,5,', 'setup,,f,6,', 'setup,,g,7,']
    const text = textDifference(csv(...lines), csv(...lines.map(line => line.replace('38', '55'))))
    expect(text.split('\n').map(line => line.trimEnd())).toEqual([
      '--- before', '+++ after', '@@ -2,7 +2,7 @@',
      ' setup,,a,1,', ' setup,,b,2,', ' setup,,c,3,', '-setup,,thrustLimit,38,%', '+setup,,thrustLimit,55,%', ' setup,,d,4,', ' setup,,e,5,', ' setup,,f,6,', '',
    ])
  })

  it('is empty between equal texts', () => {
    expect(textDifference(csv('setup,,a,1,'), csv('setup,,a,1,'))).toBe('')
  })

  it('leads from the first CSV form to the second', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      const [before, after] = [csvOf(a), csvOf(b)]
      if (before !== after) expect(lead(before, after)).toBe(after)
    }), { numRuns: 100 })
  })
})

describe('a text difference beyond a thousand lines', () => {
  const many = (first: number) => Array.from({ length: 900 }, (_, row) => `move,${row + first},target,${row},mm`)
  const around = (lines: readonly string[]) => csv('setup,,a,1,', 'setup,,b,2,', 'setup,,c,3,', 'setup,,d,4,', ...lines, 'extra,,x,1,', 'extra,,y,2,')

  it('is one block with three lines before and what follows', () => {
    const lines = textDifference(around(many(0)), around(many(1))).split('\n').map(line => line.trimEnd())
    expect(lines.slice(0, 7)).toEqual(['--- before', '+++ after', '@@ -3,905 +3,905 @@', ' setup,,b,2,', ' setup,,c,3,', ' setup,,d,4,', '-move,0,target,0,mm'])
    expect(lines.slice(905, 908)).toEqual(['-move,899,target,899,mm', '+move,1,target,0,mm', '+move,2,target,1,mm'])
    expect(lines.slice(-4)).toEqual(['+move,900,target,899,mm', ' extra,,x,1,', ' extra,,y,2,', ''])
  })

  it('leads from the first text to the second all the same, with and without a last line end', () => {
    const [before, after] = [around(many(0)), around(many(1))]
    expect(lead(before, after)).toBe(after)
    expect(lead(before, after.trimEnd())).toBe(after.trimEnd())
    expect(lead(before.trimEnd(), after)).toBe(after)
    expect(lead(csv(...many(0)), csv(...many(1)))).toBe(csv(...many(1)))
  })

  it('comes in seconds for two tables of 1,024 moves with nothing in common', () => {
    const moves = (first: number): Content['moves'] => Array.from({ length: 1024 }, (_, move) =>
      ({ move, kind: 'absolute', target: move + first, speed: first + 1, acceleration: first + 2, window: first + 3, label: `Station ${move + first}` }))
    const content = (first: number): Content => ({ axisKind: 'linear', extra: {}, setup: {}, zones: [], moves: moves(first) })
    const [before, after] = [csvOf(content(0)), csvOf(content(5000))]
    const start = performance.now()
    expect(lead(before, after)).toBe(after)
    expect(performance.now() - start).toBeLessThan(20000)
  })
})
