import { describe, expect, it } from 'vitest'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import { setEntries } from '../../../../shared/settings/move-row'
import { readMoves } from '../../../../shared/settings/read-moves'
import type { AxisKind } from '../../../../shared/settings/types'
import { readingOf } from '../../../support/settings-reading'

const absolute = { move: 0, kind: 'absolute', target: 10, speed: 250, acceleration: 2000 }
const press = { ...absolute, kind: 'press', forceLimit: 38, approach: 5 }

function read(rows: readonly unknown[] | string, axisKind: AxisKind = 'linear', wraps = false) {
  const { reading, node, told } = readingOf(typeof rows === 'string' ? rows : JSON.stringify(rows))
  return { moves: readMoves(reading, node, { axisKind, wraps }), told: told() }
}
const told = (row: object, axisKind: AxisKind = 'linear', wraps = false) => read([row], axisKind, wraps).told
const without = (row: object, key: string) => Object.fromEntries(Object.entries(row).filter(([each]) => each !== key))

describe('what a move needs', () => {
  it.each(['kind', 'target', 'speed', 'acceleration', 'move'])('%s, always', (key) => {
    expect(told(without(absolute, key))).toEqual([`missing /moves/0/${key}`])
    expect(told({ ...absolute, [key]: null })).toEqual([`missing /moves/0/${key}`])
  })

  it.each(['forceLimit', 'approach'])('%s, a press', (key) => {
    expect(told(press)).toEqual([])
    expect(told(without(press, key))).toEqual([`missing /moves/0/${key}`])
  })

  it('nothing else', () => expect(read([absolute])).toEqual({ moves: [absolute], told: [] }))
})

describe('what a move refuses', () => {
  it.each(['absolute', 'relative'])('approach and press speed, where it is %s', (kind) => {
    expect(told({ ...absolute, kind, approach: 5, pressSpeed: 10 })).toEqual(['not-allowed-here /moves/0/approach', 'not-allowed-here /moves/0/pressSpeed'])
  })

  it('dwell without a move that follows', () => {
    expect(told({ ...absolute, dwell: 100 })).toEqual(['not-allowed-here /moves/0/dwell'])
    expect(told({ ...absolute, dwell: 100, next: null })).toEqual(['not-allowed-here /moves/0/dwell'])
    expect(told({ ...absolute, dwell: 100, next: 0 })).toEqual([])
    expect(told({ ...absolute, dwell: 0, next: 3 })).toEqual([])
  })

  it('turn, unless the axis wraps', () => {
    expect(told({ ...absolute, turn: 'shortest' })).toEqual(['not-allowed-here /moves/0/turn'])
    expect(told({ ...absolute, turn: 'signed' }, 'rotary')).toEqual(['not-allowed-here /moves/0/turn'])
    expect(told({ ...absolute, turn: 'shortest' }, 'rotary', true)).toEqual([])
  })

  it('a force limit never: it is optional outside a press', () => expect(told({ ...absolute, forceLimit: 60 })).toEqual([]))
})

describe('ranges', () => {
  it.each(['speed', 'acceleration', 'deceleration', 'forceLimit', 'pressSpeed'])('%s is more than 0', (key) => {
    expect(told({ ...press, [key]: 0.000001 })).toEqual([])
    expect(told({ ...press, [key]: 0 })).toEqual([`number-range /moves/0/${key}`])
    expect(told({ ...press, [key]: -1 })).toEqual([`number-range /moves/0/${key}`])
  })

  it('are judged on the rounded value', () => {
    const row = JSON.stringify(absolute).replace('250', '0.0000005')
    expect(read(`[${row}]`).told).toEqual(['number-range /moves/0/speed'])
  })

  it.each(['window', 'dwell'])('%s is 0 or more', (key) => {
    expect(told({ ...absolute, next: 1, [key]: 0 })).toEqual([])
    expect(told({ ...absolute, next: 1, [key]: -0.000001 })).toEqual([`number-range /moves/0/${key}`])
  })

  it.each([['next', -1], ['next', 1024], ['next', 0.5], ['move', -1], ['move', 1024]])('%s %d is no row number', (key, value) => {
    expect(told({ ...absolute, [key]: value })).toEqual([`row-number /moves/0/${key}`])
  })

  it('target, window and approach may be anything in reach', () => {
    expect(told({ ...press, target: -1e9, approach: 1e9, window: 1e9 })).toEqual([])
  })
})

describe('an unused row', () => {
  const unused = { ...absolute, speed: 0, acceleration: 0 }

  it('keeps its zeros', () => {
    const row = { ...unused, deceleration: 0, forceLimit: 0 }
    expect(read([row])).toEqual({ moves: [row], told: [] })
  })

  it('is one only where both are 0', () => {
    expect(told({ ...unused, speed: 1 })).toEqual(['number-range /moves/0/acceleration'])
    expect(told({ ...unused, acceleration: 1 })).toEqual(['number-range /moves/0/speed'])
  })

  it('still needs what every move needs', () => {
    expect(told(without(unused, 'target'))).toEqual(['missing /moves/0/target'])
    expect(told({ ...unused, kind: 'press' })).toEqual(['missing /moves/0/forceLimit', 'missing /moves/0/approach'])
  })
})

describe('readMoves', () => {
  it('answers all that is wrong in all rows, by index as sent', () => {
    expect(read([{ ...absolute, move: 9, speed: -1 }, { ...press, approach: 'x', label: 5 }, 7]).told).toEqual([
      'number-range /moves/0/speed', 'number-syntax /moves/1/approach', 'json-syntax /moves/1/label', 'json-syntax /moves/2',
    ])
  })

  it('sorts rows by number and gives every key in canonical order, undefined where nothing is set', () => {
    const { moves } = read([{ ...press, move: 7 }, absolute])
    expect(moves.map(move => move.move)).toEqual([0, 7])
    for (const move of moves) expect(Object.keys(move)).toEqual([...moveFieldNames, 'move'].sort())
    expect(setEntries(moves[1] ?? {}).map(([key]) => key)).toEqual(['acceleration', 'approach', 'forceLimit', 'kind', 'move', 'speed', 'target'])
  })

  it('keeps texts as they are, and leaves empty ones out', () => {
    expect(read([{ ...absolute, label: ' up ', comment: '' }]).moves).toEqual([{ ...absolute, label: ' up ' }])
  })

  it('reads 1,024 rows', () => {
    const rows = Array.from({ length: 1024 }, (_, move) => ({ ...absolute, move }))
    expect(read(rows).moves).toHaveLength(1024)
    expect(read([...rows, absolute]).told).toEqual(['limit /moves'])
  })

  it('does not ask whether the move that follows is there: a rule judges it', () => expect(told({ ...absolute, next: 500 })).toEqual([]))
})
