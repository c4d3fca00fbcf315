import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { invertFlat, invertRenumbered } from '../../../../shared/diff/invert'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { otherKindOf, swapSides } from '../../../../shared/diff/swap-sides'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move } from '../../../../shared/settings/types'

const linear = emptyContent('linear')
const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }

describe('one change the other way round', () => {
  it('exchanges the values, turns the signs and reckons per cent from the other value', () => {
    const [change] = diffContents({ ...linear, moves: [row] }, { ...linear, moves: [{ ...row, target: 120 }] })
    expect(change).toMatchObject({ delta: -30, percent: -20 })
    expect(change && swapSides(change, undefined)).toStrictEqual({
      at: '/moves/0/target', section: 'move', row: 5, field: 'target', before: 120, after: 150, unit: 'mm', delta: 30, percent: 25, weight: 'motion', watched: true,
    })
  })

  it('has no per cent from 0, nor for points', () => {
    const changes = diffContents({ ...linear, setup: { homeOffset: 2, thrustLimit: 38 } }, { ...linear, setup: { homeOffset: 0, thrustLimit: 55 } })
    expect(changes.map(change => swapSides(change, undefined))).toMatchObject([{ delta: 2 }, { delta: -17, points: -17 }])
    for (const change of changes) expect(swapSides(change, undefined)).not.toHaveProperty('percent')
  })
})

describe('a reading the other way round', () => {
  it('points into the other content: rows added before a row no longer count', () => {
    const before: Content = { ...linear, moves: [row] }
    const after: Content = { ...linear, moves: [{ ...row, move: 1 }, { ...row, move: 2 }, { ...row, target: 7 }] }
    expect(diffContents(before, after).find(change => change.row === 5)?.at).toBe('/moves/2/target')
    expect(invertFlat(diffContents(before, after)).find(change => change.row === 5)?.at).toBe('/moves/0/target')
  })

  it('takes the units of the axis kind that was', () => {
    const limits = (content: Content, softLimitMax: number): Content => ({ ...content, setup: { softLimitMax }, moves: [{ ...row, speed: softLimitMax }], zones: [{ zone: 1, from: 0, to: softLimitMax }], extra: { a: softLimitMax } })
    const changes = diffContents(limits(linear, 10), limits(emptyContent('rotary'), 20))
    expect(otherKindOf(changes)).toBe('linear')
    expect(changes.map(change => change.unit)).toEqual([undefined, 'deg', 'deg', 'deg/s', undefined])
    expect(invertFlat(changes)).toStrictEqual(diffContents(limits(emptyContent('rotary'), 20), limits(linear, 10)))
    expect(invertFlat(changes).map(change => change.unit)).toEqual([undefined, 'mm', 'mm', 'mm/s', undefined])
  })

  it('names rows and affected moves by the numbers that they had', () => {
    const press: Move = { ...row, move: 0, kind: 'press', forceLimit: 30, approach: 140 }
    const before: Content = { ...linear, setup: { pressSpeed: 8 }, moves: [press, { ...row, move: 1 }, { ...row, move: 2, target: 9 }] }
    const after: Content = { ...linear, setup: { pressSpeed: 9 }, moves: [{ ...row, move: 0, target: 75 }, { ...press, move: 1 }, { ...row, move: 2 }, { ...row, move: 3, target: 9, speed: 300 }] }
    const there = diffRenumbered(before, after)
    const back = there && invertRenumbered(there)
    const added = [{ field: 'target', row: 0 }, { field: 'speed', row: 0 }, { field: 'acceleration', row: 0 }]
    expect(there?.changes).toMatchObject([{ field: 'pressSpeed', affects: [1] }, { field: 'kind', row: 0 }, ...added, { field: 'speed', row: 3, after: 300 }])
    expect(back?.changes).toMatchObject([{ field: 'pressSpeed', affects: [0] }, { field: 'kind', row: 0 }, ...added, { field: 'speed', row: 2, after: 250 }])
    expect(back?.renumbered).toEqual([{ first: 1, last: 3, by: -1, sure: true }])
    expect(back).toStrictEqual(diffRenumbered(after, before))
  })

  it('points to zones where they stand in the other content, in both readings', () => {
    const moves = (first: number) => [10, 20, 30].map((target, index): Move => ({ ...row, move: first + index, target }))
    const before: Content = { ...linear, moves: moves(0), zones: [{ zone: 3, from: 0, to: 1 }, { zone: 5, from: 10, to: 20 }] }
    const after: Content = { ...linear, moves: [{ ...row, move: 0, target: 75 }, ...moves(1)], zones: [{ zone: 1, from: 2, to: 3 }, { zone: 2, from: 4, to: 5 }, { zone: 5, from: 10, to: 25 }] }
    const zoneAt = (changes: readonly { readonly section: string, readonly row?: number, readonly at: string }[] = []) => changes.filter(change => change.section === 'zone' && change.row === 5).map(change => change.at)
    const reading = diffRenumbered(before, after)
    expect(zoneAt(reading?.changes)).toEqual(['/zones/2/to'])
    expect(zoneAt(reading && invertRenumbered(reading).changes)).toEqual(['/zones/1/to'])
    expect(zoneAt(invertFlat(diffContents(before, after)))).toEqual(['/zones/1/to'])
    expect(reading && invertRenumbered(reading)).toStrictEqual(diffRenumbered(after, before))
  })
})

/* Twice the other way round is the way it was: for one change whatever it is a change of. */
describe('one change turned twice', () => {
  it.each([
    ['a number', { homeOffset: 2 }, { homeOffset: 8 }], ['a percentage', { thrustLimit: 38 }, { thrustLimit: 55 }], ['from 0', { homeOffset: 0 }, { homeOffset: 3 }], ['to 0', { homeOffset: 3 }, { homeOffset: 0 }],
    ['a word', { homingMethod: 'hard-stop' }, { homingMethod: 'index-pulse' }], ['a flag', { brakeFitted: true }, { brakeFitted: false }], ['one that came', {}, { jogSpeed: 30 }], ['one that went', { jogSpeed: 30 }, {}],
    ['the drive’s own', { velocityGain: 1e-9 }, { velocityGain: 3e-9 }],
  ] as const)('is itself: %s', (_, was, is) => {
    const changes = diffContents({ ...linear, setup: was }, { ...linear, setup: is })
    expect(changes).toHaveLength(1)
    expect(changes.map(change => swapSides(swapSides(change, undefined), undefined))).toStrictEqual(changes)
    expect(changes.map(change => swapSides(change, undefined))).toStrictEqual(diffContents({ ...linear, setup: is }, { ...linear, setup: was }))
  })
})
