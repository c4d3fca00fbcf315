import { describe, expect, it } from 'vitest'
import { refusesUnit, unitCell, unitOf } from '../../../../shared/settings/cell-unit'
import { csvHeader } from '../../../../shared/settings/write-csv'
import { cellReadingOf, readingOf } from '../../../support/settings-reading'

describe('unitOf', () => {
  const unit = (text: string, canonical: string | undefined) => {
    const { reading, node, told } = cellReadingOf('5', text)
    const found = node.kind === 'cell' ? unitOf(reading, node, '/a', canonical) : undefined
    return [found === null || found === undefined ? found : found.name, ...told()]
  }

  it.each([['in', 'mm', 'in'], ['mm', 'mm', 'mm'], ['mm/s^2', 'mm/s²', 'mm/s²'], ['g', 'kg', 'g']])('%s for %s', (text, canonical, name) => expect(unit(text, canonical)).toEqual([name]))
  it('is the canonical one where the cell is empty', () => expect(unit('', 'mm')).toEqual([undefined]))
  it('is not judged where the axis kind is not known', () => expect(unit('kg', undefined)).toEqual([undefined]))
  it.each([['kg', 'mm', 'unit-unfit'], ['xyz', 'mm', 'unit-unknown'], ['mm', '', 'unit-unfit']])('%s for %j is refused', (text, canonical, code) => expect(unit(text, canonical)).toEqual([null, `${code} /a`]))

  it('names the nearest that fits', () => {
    const { reading, node } = cellReadingOf('5', 'MM')
    if (node.kind === 'cell') unitOf(reading, node, '/a', 'mm')
    expect(reading.problems.outcome().errors[0]).toMatchObject({ value: 'MM', meant: 'mm' })
  })
})

describe('refusesUnit', () => {
  it('reports a unit where none belongs, and only in the CSV form', () => {
    const { reading, node, told, message } = cellReadingOf('up', 'mm')
    expect(refusesUnit(reading, node, '/moves/0/label')).toBe(true)
    expect(told()).toEqual(['unit-unfit /moves/0/label'])
    expect(message()).toBe('This value takes no unit; leave the cell with "mm" empty.')
    for (const each of [cellReadingOf('up'), readingOf('"up"')]) expect(refusesUnit(each.reading, each.node, '/a')).toBe(false)
  })

  it('points to the cell of the unit', () => expect(csvHeader[unitCell]).toBe('unit'))
})
