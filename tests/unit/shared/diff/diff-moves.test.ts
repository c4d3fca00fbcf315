import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countStatements, MovePass, type NextAgrees } from '../../../../shared/diff/diff-moves'
import { sidesOf } from '../../../../shared/diff/sides'
import type { DiffContext, FieldChange } from '../../../../shared/diff/types'
import { emptyContent } from '../../../../shared/settings/content'
import { moveFieldNames, moveFields, type MoveFieldName } from '../../../../shared/settings/move-fields'
import type { Move, Setup } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'

const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }
const full: Required<Move> = {
  move: 5, label: 'Over lid', comment: 'slow', kind: 'press', target: 150, turn: 'positive', speed: 250, acceleration: 2000, deceleration: 1500,
  forceLimit: 38, approach: 140, pressSpeed: 8, window: 0.1, next: 6, dwell: 40,
}
const other: Required<Move> = {
  move: 5, label: 'Above lid', comment: 'slower', kind: 'absolute', target: 151, turn: 'negative', speed: 251, acceleration: 2001, deceleration: 1501,
  forceLimit: 39, approach: 141, pressSpeed: 9, window: 0.2, next: 7, dwell: 50,
}

interface Told { readonly changes: readonly FieldChange[], readonly statements: number }

function told(before: Move | undefined, after: Move | undefined, agrees?: NextAgrees, setup: Setup = {}, context: DiffContext = {}): Told {
  const content = { ...emptyContent('linear'), setup }
  const pass = new MovePass(sidesOf(content, content, context), agrees)
  pass.compare(before, 3, after, 8)
  return { changes: pass.changes(), statements: pass.statements }
}
/** The field table as a pass tells it where there is no axis flag. */
const byWeight = (['harm', 'motion', 'text'] as const).flatMap(weight => moveFieldNames.filter(name => moveFields[name].weight === weight))
const fieldsOf = (changes: readonly FieldChange[]) => changes.map(change => change.field)

describe('a row with its partner', () => {
  it.each(moveFieldNames)('differs in %s alone where that alone differs, with the values of both', (field) => {
    const { changes, statements } = told(full, { ...full, [field]: other[field] })
    expect(changes).toHaveLength(1)
    expect(changes[0]).toMatchObject({ at: `/moves/8/${field}`, section: 'move', row: 5, field, before: full[field], after: other[field] })
    expect(statements).toBe(1)
  })

  it.each(moveFieldNames)('that has %s where the other has not points at the one that has it', (field) => {
    const { [field]: _, ...without } = full
    expect(told(without as Move, full).changes).toMatchObject([{ at: `/moves/8/${field}`, after: full[field] }])
    expect(told(full, without as Move).changes).toMatchObject([{ at: `/moves/3/${field}`, before: full[field] }])
  })

  it('differs in every field at once, by weight, within a weight in the order of the table', () => {
    const { changes, statements } = told(full, other)
    expect(fieldsOf(changes)).toEqual(byWeight)
    expect(changes.map(change => change.after)).toEqual(byWeight.map(name => other[name]))
    expect(statements).toBe(moveFieldNames.length)
  })

  it('is told nothing of where nothing differs, its number included', () => {
    expect(told(full, { ...full, move: 6 })).toEqual({ changes: [], statements: 0 })
  })

  it('bears the number of the second table', () => {
    expect(told(row, { ...row, move: 9, speed: 300 }).changes).toMatchObject([{ row: 9, field: 'speed' }])
  })
})

describe('a row without a partner', () => {
  it('is a change for each field that it has and one statement', () => {
    expect(told(undefined, full)).toMatchObject({ statements: 1, changes: byWeight.map(field => ({ at: `/moves/8/${field}`, row: 5, after: full[field] })) })
    expect(told(row, undefined)).toMatchObject({ statements: 1, changes: ['kind', 'target', 'speed', 'acceleration'].map(field => ({ at: `/moves/3/${field}`, row: 5 })) })
  })

  it('weighs what its fields weigh: a default that it leaves to the setup is none of its fields', () => {
    const changes = told(undefined, { ...row, deceleration: 2000 }).changes
    expect(changes.find(change => change.field === 'deceleration')).toMatchObject({ weight: 'motion', watched: true })
  })
})

describe('a default written out', () => {
  const press: Move = { ...row, kind: 'press', forceLimit: 30, approach: 140 }
  it.each([
    ['deceleration', row, { ...row, deceleration: 2000 }, {}, 'text'],
    ['deceleration', row, { ...row, deceleration: 1999 }, {}, 'motion'],
    ['turn', row, { ...row, turn: 'signed' }, {}, 'text'],
    ['turn', row, { ...row, turn: 'shortest' }, {}, 'motion'],
    ['pressSpeed', press, { ...press, pressSpeed: 8 }, { pressSpeed: 8 }, 'text'],
    ['pressSpeed', press, { ...press, pressSpeed: 9 }, { pressSpeed: 8 }, 'harm'],
    ['pressSpeed', press, { ...press, pressSpeed: 8 }, {}, 'harm'],
  ] as const)('%s: from %j to %j with a setup of %j weighs %s', (field, before, after, setup, weight) => {
    expect(told(before, after, undefined, setup).changes).toMatchObject([{ field, weight, watched: weight !== 'text' }])
    expect(told(after, before, undefined, setup).changes).toMatchObject([{ field, weight, watched: weight !== 'text' }])
  })

  it('stays text on an axis that can do harm', () => {
    expect(told(row, { ...row, deceleration: 2000 }, undefined, {}, { flags: ['gravity'] }).changes).toMatchObject([{ weight: 'text' }])
    expect(told(row, { ...row, deceleration: 1000 }, undefined, {}, { flags: ['gravity'] }).changes).toMatchObject([{ weight: 'harm' }])
  })
})

describe('followers, where somebody else says whether they agree', () => {
  const moved: NextAgrees = (was, is) => was === undefined || is === undefined ? was === is : was + 1 === is
  it('are no change where they went along, though their numbers differ', () => {
    expect(told({ ...row, next: 6 }, { ...row, next: 7 }, moved)).toEqual({ changes: [], statements: 0 })
  })
  it('are a change where they did not, though their numbers are the same', () => {
    expect(told({ ...row, next: 6 }, { ...row, next: 6 }, moved)).toMatchObject({ changes: [{ field: 'next', before: 6, after: 6 }], statements: 1 })
  })
  it('leave all other fields to themselves', () => {
    expect(fieldsOf(told({ ...full, next: 6 }, { ...other, next: 7 }, moved).changes)).toEqual(byWeight.filter(name => name !== 'next'))
  })
})

describe('a pass over several rows', () => {
  it('tells harm of all rows before motion of the first, and a default written out with the texts', () => {
    const pass = new MovePass(sidesOf(emptyContent('linear'), emptyContent('linear'), {}))
    pass.compare({ ...row, label: 'a' }, 0, { ...row, label: 'b', speed: 300, forceLimit: 40, deceleration: 2000 }, 0)
    pass.compare({ ...row, move: 6, turn: 'signed' }, 1, { ...row, move: 6, kind: 'relative', target: 3 }, 1)
    expect(pass.changes().map(({ row: number, field, weight }) => `${weight} ${number} ${field}`)).toEqual([
      'harm 5 forceLimit', 'harm 6 kind', 'motion 5 speed', 'motion 6 target', 'text 5 label', 'text 5 deceleration', 'text 6 turn',
    ])
  })
})

describe('counting statements', () => {
  it('is what a pass over the same rows counts', () => {
    fc.assert(fc.property(arbitraryContent(), arbitraryContent(), ({ moves: before }, { moves: after }) => {
      const numbers = [...new Set([...before, ...after].map(move => move.move))]
      const each = numbers.map(number => told(before.find(move => move.move === number), after.find(move => move.move === number)).statements)
      expect(countStatements(before, after)).toBe(each.reduce((sum, count) => sum + count, 0))
    }), { numRuns: 60 })
  })

  it('counts a row that comes or goes once, and an edited one field by field', () => {
    const rows = (...targets: number[]) => targets.map((target, move): Move => ({ ...row, move, target }))
    expect(countStatements(rows(1, 2, 3), rows(1, 2, 3))).toBe(0)
    expect(countStatements(rows(1, 2, 3), rows(1, 2))).toBe(1)
    expect(countStatements([], rows(1, 2))).toBe(2)
    expect(countStatements(rows(1, 2), rows(5, 6).map(move => ({ ...move, speed: 1 })))).toBe(4)
  })
})

/* The comparison is written out field by field: a field that is new in the table must be written there too. */
describe('the fields of a move', () => {
  it('are the fourteen that the comparison knows', () => {
    const known: readonly MoveFieldName[] = ['label', 'comment', 'kind', 'target', 'turn', 'speed', 'acceleration', 'deceleration', 'forceLimit', 'approach', 'pressSpeed', 'window', 'next', 'dwell']
    expect(moveFieldNames).toEqual(known)
  })
})
