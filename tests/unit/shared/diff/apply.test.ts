import { describe, expect, it } from 'vitest'
import { applyFlat } from '../../../../shared/diff/apply'
import { applyRenumbered } from '../../../../shared/diff/apply-renumbered'
import { diffContents } from '../../../../shared/diff/diff'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import type { RenumberedReading } from '../../../../shared/diff/types'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move } from '../../../../shared/settings/types'

const linear = emptyContent('linear')
const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }
const rows = (targets: readonly number[], first: number): Content => ({ ...linear, moves: targets.map((target, index) => ({ ...row, move: first + index, target })) })

describe('applyFlat', () => {
  it('makes rows that come, in the order of their numbers, and drops those that go', () => {
    const before: Content = { ...linear, moves: [row], zones: [{ zone: 2, from: 0, to: 1 }] }
    const after: Content = { ...linear, moves: [{ ...row, move: 2, label: 'New' }, { ...row, move: 7 }], zones: [{ zone: 1, from: 5, to: 6 }] }
    expect(applyFlat(before, diffContents(before, after))).toStrictEqual(after)
  })

  it('leaves the content it starts from alone', () => {
    const before = Object.freeze({ ...linear, setup: Object.freeze({ jogSpeed: 30 }), moves: Object.freeze([Object.freeze({ ...row })]) })
    const after: Content = { ...linear, setup: { jogSpeed: 40 }, moves: [] }
    expect(applyFlat(before, diffContents(before, after))).toStrictEqual(after)
    expect(before.setup).toEqual({ jogSpeed: 30 })
  })

  it('refuses a content that the changes do not start from', () => {
    const changes = diffContents({ ...linear, setup: { jogSpeed: 30 } }, { ...linear, setup: { jogSpeed: 40 } })
    expect(() => applyFlat({ ...linear, setup: { jogSpeed: 31 } }, changes)).toThrow(expect.objectContaining({ code: 'wrong-base', details: { at: '/setup/jogSpeed' } }))
    expect(() => applyFlat(linear, changes)).toThrow(expect.objectContaining({ code: 'wrong-base' }))
  })
})

describe('applyRenumbered', () => {
  const before = rows([0, 10, 20, 30], 0)
  const after = rows([75, 0, 10, 20, 30], 0)
  const reading = diffRenumbered(before, after) as RenumberedReading

  it('gives rows their new numbers', () => {
    expect(reading.renumbered).toEqual([{ first: 0, last: 3, by: 1, sure: true }])
    expect(applyRenumbered(before, reading)).toStrictEqual(after)
  })

  it('tells the row that is gone from the one that has its number now', () => {
    const labelled: Content = { ...linear, moves: [{ ...row, move: 0, target: 1, label: 'x' }, ...rows([10, 20, 30], 1).moves].map(move => ({ ...move, label: 'x' })) }
    const shorter: Content = { ...linear, moves: rows([10, 20, 30], 0).moves.map(move => ({ ...move, label: 'x' })) }
    const told = diffRenumbered(labelled, shorter) as RenumberedReading
    expect(told.changes.filter(change => change.field === 'label')).toMatchObject([{ row: 0, before: 'x' }])
    expect(applyRenumbered(labelled, told)).toStrictEqual(shorter)
  })

  it('refuses a content that the reading does not start from', () => {
    expect(() => applyRenumbered(rows([0, 10], 0), reading)).toThrow(expect.objectContaining({ code: 'wrong-base', details: { before: 2 } }))
    const changed = { ...reading, changes: diffContents(rows([1], 0), rows([2], 0)) }
    expect(() => applyRenumbered(before, changed)).toThrow(expect.objectContaining({ code: 'wrong-base' }))
    const lost = { ...reading, pairs: [] }
    expect(() => applyRenumbered(before, lost)).toThrow(expect.objectContaining({ code: 'wrong-base' }))
  })
})
