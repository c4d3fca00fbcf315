import { describe, expect, it } from 'vitest'
import { cellMaker, decimalOf } from '../../../../shared/settings/csv-cells'
import type { Delimiter } from '../../../../shared/settings/csv-header'
import type { CsvRecord } from '../../../../shared/settings/csv-records'
import type { Entry } from '../../../../shared/settings/csv-tree'
import { Problems } from '../../../../shared/settings/problems'

const problemsWithoutPlaces = () => new Problems({ place: () => ({ line: 1, column: 1 }), shown: () => '' })
const records = (...lines: string[]): CsvRecord[] => lines.map((line, offset) => ({ cells: line.split(';'), offset }))

function decimal(lines: string[], asked?: 'point' | 'comma', delimiter: Delimiter = ';') {
  const problems = problemsWithoutPlaces()
  return [decimalOf(delimiter, records(...lines), asked, problems), ...problems.outcome().errors.map(error => error.code)]
}

describe('decimalOf', () => {
  it('is a point where commas part the cells, whatever stands in them and is asked', () => {
    expect(decimal(['setup;;jerk;0,5;'], 'comma', ',')).toEqual(['point'])
  })

  it.each([
    [['setup;;jerk;0,5;mm/s³'], 'comma'], [['zone;1;from;0,5;mm'], 'comma'], [['move;1;target;0,5;mm'], 'comma'], [['extra;;Ramp;0,5;A'], 'comma'], [['reading;;Current;0,5;A'], 'comma'],
    [['setup;;jerk;0.5;'], 'point'], [['setup;;velocityGain;0.5;'], 'point'],
  ])('is told by numeric cells: %j', (lines, sign) => expect(decimal(lines)).toEqual([sign]))

  it.each([
    ['unit;;firmware;3.12;'], ['file;;note;0,5;'], ['file;;exportedAt;2026-11-30T08:15:00.5Z;'], ['move;1;label;0,5;'], ['move;1;comment;1.5 bar;'], ['setup;;homingMethod;0,5;'], ['extra;;Recipe;0,5;text'], ['extra;;K;0,5;'], ['setup;;unknown;0,5;'],
  ])('is not told by %s', line => expect(decimal([line])).toEqual([undefined]))

  it('is what is asked, where nothing tells it', () => {
    expect(decimal(['setup;;jerk;1.500;'], 'comma')).toEqual(['comma'])
    expect(decimal(['setup;;jerk;1.500;', 'setup;;jogSpeed;0,5;'], 'point')).toEqual(['comma'])
    expect(decimal([])).toEqual([undefined])
  })

  it('is refused where cells contradict each other, once', () => {
    expect(decimal(['setup;;jerk;0.5;', 'setup;;jogSpeed;0,5;', 'zone;1;from;0,5;'])).toEqual(['mixed', 'decimal-mixed'])
  })
})

describe('cellMaker', () => {
  const spot = { offset: 0, end: 0, cell: 3 }
  function made(entry: Entry, sign: 'point' | 'comma' | 'mixed' | undefined, delimiter: Delimiter = ';') {
    const problems = problemsWithoutPlaces()
    const node = cellMaker(delimiter, sign, problems)(entry, spot, '/a')
    return [node.kind === 'cell' ? node.text : node.kind, ...problems.outcome().errors.map(error => error.code)]
  }
  const setup = (value: string): Entry => ({ section: 'setup', field: 'jerk', value, unit: '' })
  const extra = (value: string, unit = ''): Entry => ({ section: 'extra', field: 'K', value, unit })

  it.each([['0,5', '0.5'], ['-12,25', '-12.25'], ['180', '180'], ['1e3', '1e3']])('under a comma %s is %s', (value, text) => expect(made(setup(value), 'comma')).toEqual([text]))
  it.each([['0.5', 'comma'], ['1.500', 'comma'], ['1.234,5', 'comma'], ['0,5', 'point'], ['1,500', 'point'], ['1,5', undefined], ['1.5', undefined]] as const)(
    '%s is unclear under %s', (value, sign) => expect(made(setup(value), sign)).toEqual(['refused', 'number-unclear']))

  it('keeps texts as they are', () => {
    for (const entry of [{ section: 'move', field: 'label', value: '0,5', unit: '' }, { section: 'unit', field: 'firmware', value: '3.12', unit: '' }, extra('0,5', 'text')] as const) {
      expect(made(entry, 'comma')).toEqual([entry.value])
      expect(made(entry, undefined)).toEqual([entry.value])
    }
  })

  it('says nothing more where the file mixes signs', () => expect(made(setup('0,5'), 'mixed')).toEqual(['refused']))

  describe('of the drive’s own without a unit', () => {
    it.each([['1,5', 'comma', '1.5'], ['1.5', 'point', '1.5'], ['1.2.3', 'comma', '1.2.3'], ['3,4,5', 'point', '3,4,5'], ['a,b', undefined, 'a,b'], ['v1.5', undefined, 'v1.5'], ['15', undefined, '15']] as const)(
      '%s under %s is %s', (value, sign, text) => expect(made(extra(value), sign)).toEqual([text]))
    it.each([['1.5', 'comma'], ['1,5', 'point'], ['1.5', undefined], ['1,5', undefined]] as const)(
      '%s is unclear under %s', (value, sign) => expect(made(extra(value), sign)).toEqual(['refused', 'number-unclear']))
    it('a comma makes text of it where commas part the cells', () => {
      expect(made(extra('1,5'), 'point', ',')).toEqual(['1,5'])
      expect(made(extra('1,5', 'A'), 'point', ',')).toEqual(['refused', 'number-unclear'])
    })
  })

  it('names both readings', () => {
    const problems = problemsWithoutPlaces()
    cellMaker(',', 'point', problems)(setup('1,500'), spot, '/setup/jerk')
    expect(problems.outcome().errors[0]?.message).toBe('"1,500" could be 1.500 or 1500: the decimal point is the sign of this file.')
  })
})
