import { describe, expect, it } from 'vitest'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move, Setup } from '../../../../shared/settings/types'

const row = { kind: 'absolute', speed: 250, acceleration: 2000 } as const
const table = (targets: readonly number[], setup: Setup = {}, first = 0): Content => ({
  ...emptyContent('linear'), setup, moves: targets.map((target, index): Move => ({ move: first + index, target, ...row })),
})

describe('the renumbered reading', () => {
  it('of one row inserted among 256 is one run and the row, where the flat one has a change a row', () => {
    const targets = Array.from({ length: 256 }, (_, k) => k * 0.5)
    const reading = diffRenumbered(table(targets), table([...targets.slice(0, 3), 77.25, ...targets.slice(3)]))
    expect(reading?.renumbered).toEqual([{ first: 3, last: 255, by: 1, sure: true }])
    expect(reading?.changes.map(({ row: number, field }) => [number, field])).toEqual([[3, 'kind'], [3, 'target'], [3, 'speed'], [3, 'acceleration']])
  })

  it('holds every row of both tables in its pairs, in the order of the second', () => {
    const reading = diffRenumbered(table([0, 1, 2, 3, 4, 5]), table([0, 2, 3, 4, 9, 5]))
    expect(reading?.pairs).toEqual([
      { before: 0, after: 0 }, { before: 1 }, { before: 2, after: 1 }, { before: 3, after: 2 }, { before: 4, after: 3 }, { after: 4 }, { before: 5, after: 5 },
    ])
  })

  it('is not offered for edits alone, for one change, or where the flat one says as much', () => {
    expect(diffRenumbered(table([0, 1, 2]), table([0, 7, 8]))).toBeUndefined()
    expect(diffRenumbered(table([0, 1, 2]), table([0, 1, 3]))).toBeUndefined()
    expect(diffRenumbered(table([0, 1]), table([9, 0, 1]))).toMatchObject({ renumbered: [{ first: 0, last: 1, by: 1 }] })
    expect(diffRenumbered(table([0]), table([9, 0]))).toBeUndefined()
  })

  it('breaks a run at a row that kept its number', () => {
    const before: Content = { ...emptyContent('linear'), moves: [3, 4, 8, 9, 10].map((move): Move => ({ move, target: move, ...row })) }
    const after: Content = { ...before, moves: [[4, 3], [5, 4], [8, 8], [10, 9], [11, 10]].map(([move = 0, target = 0]): Move => ({ move, target, ...row })) }
    expect(diffRenumbered(before, after)?.renumbered).toEqual([{ first: 3, last: 4, by: 1, sure: true }, { first: 9, last: 10, by: 1, sure: true }])
  })

  it('passes over rows that are gone inside a run', () => {
    const before: Content = { ...emptyContent('linear'), moves: [0, 1, 2, 3, 4].map((move): Move => ({ move, target: move, ...row })) }
    const after: Content = { ...before, moves: [[7, 0], [8, 1], [10, 3], [11, 4]].map(([move = 0, target = 0]): Move => ({ move, target, ...row })) }
    expect(diffRenumbered(before, after)?.renumbered).toEqual([{ first: 0, last: 4, by: 7, sure: true }])
  })

  it('tells the other sections as the flat one does, and names moves by their number in the second content', () => {
    const press: Move = { move: 0, kind: 'press', target: 150, speed: 100, acceleration: 1000, forceLimit: 38, approach: 140 }
    const before: Content = { ...table([], { pressSpeed: 8, thrustLimit: 38 }), moves: [press, ...table([1, 2], {}, 1).moves], extra: { a: 1 }, zones: [{ zone: 1, from: 0, to: 1 }] }
    const after: Content = {
      ...table([9], { pressSpeed: 12, thrustLimit: 55 }), moves: [...table([9]).moves, { ...press, move: 1 }, ...table([1, 2], {}, 2).moves], extra: { a: 2 }, zones: [{ zone: 1, from: 0, to: 2 }],
    }
    const changes = diffRenumbered(before, after)?.changes.filter(change => change.section !== 'move')
    expect(changes).toMatchObject([
      { field: 'pressSpeed', affects: [1] }, { field: 'thrustLimit', points: 17 }, { field: 'to', row: 1 }, { field: 'a', delta: 1 },
    ])
  })

  it('weighs and watches as its context says', () => {
    const edited = { ...table([9, 0, 1, 2, 3]), moves: table([9, 0, 1, 2, 3]).moves.map(move => move.target === 2 ? { ...move, speed: 300, label: 'a' } : move) }
    const changes = diffRenumbered(table([0, 1, 2, 3]), edited, { flags: ['press'], watched: ['label'] })?.changes
    expect(changes?.filter(change => change.row === 3)).toMatchObject([
      { field: 'speed', before: 250, after: 300, weight: 'harm' }, { field: 'label', weight: 'text', watched: true },
    ])
  })
})
