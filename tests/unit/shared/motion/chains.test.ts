import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { endlessChains, followers, knownStarts, usedRows } from '../../../../shared/motion/chains'
import type { Move } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, press, relative, unused } from '../../../support/check-input'

const startsOf = (moves: Move[], number: number) => knownStarts(usedRows(moves)).get(number)
const loops = (moves: Move[]) => endlessChains(usedRows(moves)).map(loop => loop.map(row => row.move.move))

describe('rows', () => {
  it('leave unused ones out and keep their place in the table', () => {
    expect(usedRows([absolute(0, 0), unused(1), absolute(2, 0)]).map(({ move, index }) => [move.move, index])).toEqual([[0, 0], [2, 2]])
  })

  it('follow where a used row names them', () => {
    expect([...followers(usedRows([absolute(0, 0, { next: 4 }), { ...unused(1), next: 9 }, absolute(2, 0, { next: 4 })]))]).toEqual([4])
  })
})

describe('knownStarts', () => {
  it('is the end of each row that names the row: 50, and the target 150 of a press', () => {
    expect(startsOf([absolute(0, 50, { next: 2 }), press(1, 100, 150, { next: 2 }), absolute(2, 0)], 2)).toEqual({ positions: [50, 150], open: false })
  })

  it('adds up relative moves: 10 + 0.1 + 0.2 = 10.3', () => {
    const moves = [absolute(0, 10, { next: 1 }), relative(1, 0.1, { next: 2 }), relative(2, 0.2, { next: 3 }), relative(3, 5)]
    expect(startsOf(moves, 3)).toEqual({ positions: [10.3], open: false })
  })

  it('stays open behind a relative move that anybody may call', () => {
    const moves = [relative(0, 5, { next: 2 }), absolute(1, 50, { next: 2 }), relative(2, 5, { next: 3 }), absolute(3, 0, { next: 4 }), absolute(4, 0)]
    expect(startsOf(moves, 2)).toEqual({ positions: [50], open: true })
    expect(startsOf(moves, 3)).toEqual({ positions: [55], open: true })
    expect(startsOf(moves, 4)).toEqual({ positions: [0], open: false })
  })

  it('has none for a row that nobody names, and no place for a loop of relative moves', () => {
    expect(startsOf([absolute(0, 0)], 0)).toBeUndefined()
    expect(startsOf([relative(0, 5, { next: 1 }), relative(1, -5, { next: 0 })], 0)).toEqual({ positions: [], open: false })
  })

  it('keeps the lowest and the highest of many', () => {
    const moves = [absolute(0, 30, { next: 3 }), absolute(1, 10, { next: 3 }), absolute(2, 20, { next: 3 }), relative(3, -5, { next: 4 }), absolute(4, 0)]
    expect(startsOf(moves, 3)).toEqual({ positions: [10, 30], open: false })
    expect(startsOf(moves, 4)).toEqual({ positions: [5, 25], open: false })
  })

  it('carries every way into a loop that comes back all round it: in at 100 and, one step on, at 7', () => {
    const moves = [absolute(0, 100, { next: 2 }), absolute(1, 7, { next: 3 }), relative(2, 10, { next: 3 }), relative(3, -10, { next: 2 })]
    expect(startsOf(moves, 2)).toEqual({ positions: [-3, 100], open: false })
    expect(startsOf(moves, 3)).toEqual({ positions: [7, 110], open: false })
  })

  it('agrees with following the chain from each row that goes to a place of its own', () => {
    fc.assert(fc.property(arbitraryContent({ most: 14 }), ({ moves }) => {
      const rows = usedRows(moves)
      const byNumber = new Map(rows.map(({ move }) => [move.move, move]))
      const walked = new Map<number, number[]>()
      for (const { move } of rows.filter(row => row.move.kind !== 'relative')) {
        let end = BigInt(move.target.toFixed(6).replace('.', ''))
        const seen = new Set<number>()
        let follower = byNumber.get(move.next ?? -1)
        while (follower && !seen.has(follower.move)) {
          walked.set(follower.move, [...walked.get(follower.move) ?? [], Number(end) / 1e6])
          seen.add(follower.move)
          if (follower.kind !== 'relative') break
          end += BigInt(follower.target.toFixed(6).replace('.', ''))
          follower = byNumber.get(follower.next ?? -1)
        }
      }
      // Several ways into one runaway loop: only the first counts all round.
      const runaway = endlessChains(rows).filter(loop => loop.every(row => row.move.kind === 'relative')).flat().map(row => row.move.move)
      for (const [number, { positions }] of knownStarts(rows)) {
        if (!byNumber.has(number) || runaway.includes(number)) continue
        const all = walked.get(number) ?? []
        expect(positions).toEqual(all.length === 0 ? [] : [...new Set([Math.min(...all), Math.max(...all)])])
      }
    }))
  })

  it('of a runaway loop of three, from where it is entered and once round: 100, 110 and 115', () => {
    const loop = [relative(1, 10, { next: 2 }), relative(2, 5, { next: 3 }), relative(3, 1, { next: 1 })]
    const entered = (at: number) => [1, 2, 3].map(number => startsOf([absolute(0, 100, { next: at }), ...loop], number))
    const one = (place: number) => ({ positions: [place], open: false })
    expect(entered(1)).toEqual([one(100), one(110), one(115)])
    expect(entered(2)).toEqual([one(106), one(100), one(105)])
    expect(entered(3)).toEqual([one(101), one(111), one(100)])
  })

  it('is open all round a loop that is entered nobody knows where', () => {
    const loop = [relative(1, 10, { next: 2 }), relative(2, 5, { next: 1 })]
    for (const next of [1, 2]) for (const number of [1, 2]) expect(startsOf([relative(0, 3, { next }), ...loop], number), `${number} entered at ${next}`).toEqual({ positions: [], open: true })
  })

  it('of tables that branch and meet again waits for every row that leads in', () => {
    // Only later rows are named, so that there is no loop; whole targets, so that sums are exact.
    const row = (move: number) => fc.record({ kind: fc.constantFrom('absolute', 'relative'), target: fc.integer({ min: -20, max: 20 }), next: fc.integer({ min: move + 1, max: 8 }), names: fc.integer({ min: 0, max: 4 }) })
      .map(({ kind, target, next, names }) => (kind === 'absolute' ? absolute : relative)(move, target, names === 0 || next > 7 ? {} : { next }))
    fc.assert(fc.property(fc.tuple(...[0, 1, 2, 3, 4, 5, 6, 7].map(row)), fc.nat(), (moves, turn) => {
      /** Every place that a row may begin at, and undefined for one that nobody knows. */
      const begins = (number: number): (number | undefined)[] => moves.filter(({ next }) => next === number).flatMap((before) => {
        if (before.kind === 'absolute') return [before.target]
        const from = begins(before.move)
        return from.length === 0 ? [undefined] : from.map(place => place === undefined ? undefined : place + before.target)
      })
      const shuffled = [...moves.slice(turn % 8), ...moves.slice(0, turn % 8)]
      for (const { move } of moves) {
        const all = begins(move), places = all.filter(place => place !== undefined)
        const expected = all.length === 0 ? undefined : { positions: places.length === 0 ? [] : [...new Set([Math.min(...places), Math.max(...places)])], open: all.includes(undefined) }
        expect(startsOf(shuffled, move), `move ${move}`).toEqual(expected)
      }
    }), { numRuns: 300 })
  })

  it('goes round a loop once', () => {
    expect(startsOf([absolute(0, 100, { next: 1 }), relative(1, 10, { next: 1 })], 1)).toEqual({ positions: [100], open: false })
    expect(startsOf([absolute(3, 50, { next: 3 })], 3)).toEqual({ positions: [50], open: false })
  })
})

describe('endlessChains', () => {
  it('finds each loop once, from its lowest number on, without what leads in', () => {
    expect(loops([absolute(0, 0, { next: 6 }), absolute(5, 0, { next: 7 }), absolute(6, 0, { next: 5 }), absolute(7, 0, { next: 6 }), relative(9, 1, { next: 9 })]))
      .toEqual([[5, 7, 6], [9]])
  })

  it('finds none where a chain ends, at a missing or unused row too', () => {
    expect(loops([absolute(0, 0, { next: 1 }), absolute(1, 0)])).toEqual([])
    expect(loops([absolute(0, 0, { next: 7 })])).toEqual([])
    expect(loops([absolute(0, 0, { next: 1 }), { ...unused(1), next: 0 }])).toEqual([])
  })

  it('holds just the rows that come back to themselves', () => {
    fc.assert(fc.property(arbitraryContent({ most: 14 }), ({ moves }) => {
      const rows = usedRows(moves)
      const byNumber = new Map(rows.map(({ move }) => [move.move, move]))
      const returning = rows.filter(({ move }) => {
        let at: Move | undefined = move
        for (let step = 0; step < rows.length && at; step++) {
          at = at.next === undefined ? undefined : byNumber.get(at.next)
          if (at === move) return true
        }
        return false
      }).map(({ move }) => move.move)
      expect(loops([...moves]).flat().sort((a, b) => a - b)).toEqual(returning)
    }))
  })
})
