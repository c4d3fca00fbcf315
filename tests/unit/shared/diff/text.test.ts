import fc from 'fast-check'
import { applyPatch } from 'diff'
import { describe, expect, it } from 'vitest'
import { textDifference } from '../../../../shared/diff/text'

const header = 'section,row,field,value,unit'
const csv = (...lines: string[]) => [header, ...lines, ''].join('\r\n')

describe('the text difference', () => {
  it('shows the lines that differ with three around them', () => {
    const lines = ['setup,,a,1,', 'setup,,b,2,', 'setup,,c,3,', 'setup,,thrustLimit,38,%', 'setup,,d,4,', 'setup,,e,5,', 'setup,,f,6,', 'setup,,g,7,']
    const text = textDifference(csv(...lines), csv(...lines.map(line => line.replace('38', '55'))))
    expect(text.split('\n').map(line => line.trimEnd())).toEqual([
      '===================================================================', '--- before', '+++ after', '@@ -2,7 +2,7 @@',
      ' setup,,a,1,', ' setup,,b,2,', ' setup,,c,3,', '-setup,,thrustLimit,38,%', '+setup,,thrustLimit,55,%', ' setup,,d,4,', ' setup,,e,5,', ' setup,,f,6,', '',
    ])
  })

  it('is empty between equal texts', () => {
    expect(textDifference(csv('setup,,a,1,'), csv('setup,,a,1,'))).toBe('')
  })

  it('leads from the first text to the second', () => {
    const text = fc.array(fc.constantFrom('setup,,a,1,', 'setup,,a,2,', 'move,0,target,5,mm', 'extra,,"x,y",=1,text'), { maxLength: 12 }).map(lines => csv(...lines))
    fc.assert(fc.property(text, text, (before, after) => {
      const difference = textDifference(before, after)
      expect(difference === '' ? before : applyPatch(before, difference)).toBe(after)
    }))
  })
})
