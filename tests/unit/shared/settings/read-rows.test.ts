import { describe, expect, it } from 'vitest'
import { maxMoves, maxZones, readRowNumber, readRows, readZones } from '../../../../shared/settings/read-rows'
import { objectReadingOf, readingOf } from '../../../support/settings-reading'

function zones(text: string, wraps = false) {
  const { reading, node, told } = readingOf(text)
  return { zones: readZones(reading, node, { axisKind: wraps ? 'rotary' : 'linear', wraps }), told: told() }
}
const list = (count: number) => JSON.stringify(Array.from({ length: count }, (_, index) => ({ zone: index + 1, from: index, to: index + 1 })))

describe('readZones', () => {
  it('reads them in the order of their numbers, keys in canonical order', () => {
    const { zones: read, told } = zones('[{ "zone": 3, "from": 1, "to": 2 }, { "to": 25, "from": 10, "zone": 1 }]')
    expect(read).toEqual([{ from: 10, to: 25, zone: 1 }, { from: 1, to: 2, zone: 3 }])
    expect(Object.keys(read[0] ?? {})).toEqual(['from', 'to', 'zone'])
    expect(told).toEqual([])
  })

  it.each([
    ['{ "zone": 0, "from": 1, "to": 2 }', 'row-number /zones/0/zone'], ['{ "zone": 33, "from": 1, "to": 2 }', 'row-number /zones/0/zone'], ['{ "from": 1, "to": 2 }', 'missing /zones/0/zone'],
    ['{ "zone": 1, "to": 2 }', 'missing /zones/0/from'], ['{ "zone": 1, "from": 1, "to": null }', 'missing /zones/0/to'], ['{ "zone": 1, "from": "a", "to": 2 }', 'number-syntax /zones/0/from'],
    ['{ "zone": 1, "from": 2, "to": 1 }', 'order /zones/0/from'], ['{ "zone": 1, "from": 1, "to": 1 }', 'order /zones/0/from'], ['{ "zone": 1, "from": 1, "to": 1.0000004 }', 'order /zones/0/from'],
    ['5', 'json-syntax /zones/0'], ['null', 'json-syntax /zones/0'],
  ])('%s: %s', (row, problem) => expect(zones(`[${row}]`)).toEqual({ zones: [], told: [problem] }))

  it('may wrap where the axis does', () => {
    expect(zones('[{ "zone": 1, "from": 350, "to": 10 }]', true)).toEqual({ zones: [{ from: 350, to: 10, zone: 1 }], told: [] })
    expect(zones('[{ "zone": 1, "from": 10, "to": 10 }]', true).told).toEqual(['order /zones/0/from'])
  })

  it('has each number once', () => {
    expect(zones('[{ "zone": 2, "from": 1, "to": 2 }, { "zone": 2.0, "from": 3, "to": 4 }]').told).toEqual(['row-duplicate /zones/1/zone'])
  })

  it(`reads ${maxZones} and no more`, () => {
    expect(zones(list(32))).toMatchObject({ told: [] })
    expect(zones(list(33))).toEqual({ zones: [], told: ['limit /zones'] })
  })
})

describe('readRows', () => {
  it('tells the limit and the size', () => {
    const { reading, node, message } = readingOf(list(1025))
    readRows(reading, node, '/moves', maxMoves, () => ({}), () => 0)
    expect(message()).toBe('1025 rows; at most 1024 are read.')
  })

  it('points to rows as they were sent, and answers them by number', () => {
    const { reading, node } = readingOf('[{ "a": 5 }, { "a": 2 }]')
    const seen: string[] = []
    const rows = readRows(reading, node, '/moves', 10, (row, at) => {
      seen.push(at)
      return row.values[0]?.kind === 'number' ? row.values[0].value : undefined
    }, value => value)
    expect(seen).toEqual(['/moves/0', '/moves/1'])
    expect(rows).toEqual([2, 5])
  })

  it('wants a list', () => {
    const { reading, node, told } = readingOf('{}')
    expect(readRows(reading, node, '/moves', 10, () => 1, value => value)).toEqual([])
    expect(told()).toEqual(['json-syntax /moves'])
  })
})

describe('readRowNumber', () => {
  it('keeps in mind what is taken', () => {
    const { reading, object, told } = objectReadingOf('{ "move": 5 }')
    const taken = new Set<number>()
    const read = () => readRowNumber(reading, object.values[0], object, '/moves/0/move', 0, 1023, taken)
    expect(read()).toBe(5)
    expect(read()).toBeUndefined()
    expect(told()).toEqual(['row-duplicate /moves/0/move'])
  })
})
