import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countStatements, MovePass } from '../../../../shared/diff/diff-moves'
import { pushExtraChanges, pushFileChanges, pushSetupChanges, pushZoneChanges } from '../../../../shared/diff/diff-values'
import { byWeight } from '../../../../shared/diff/order'
import { sidesOf } from '../../../../shared/diff/sides'
import type { FieldChange } from '../../../../shared/diff/types'
import { walkByNumber } from '../../../../shared/diff/walk'
import { emptyContent } from '../../../../shared/settings/content'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import type { Content, Move } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'

describe('a walk over two tables', () => {
  it('meets each number once, in order, with the rows that have it and their indices', () => {
    const met: unknown[] = []
    walkByNumber([1, 2, 5], [0, 2, 5, 7], row => row, (...visit) => met.push(visit))
    expect(met).toEqual([
      [undefined, 0, 0, 0], [1, 0, undefined, 1], [2, 1, 2, 1], [5, 2, 5, 2], [undefined, 3, 7, 3],
    ])
  })

  it('meets nothing in empty tables', () => {
    walkByNumber<number>([], [], row => row, () => expect.unreachable())
  })
})

describe('a pass over two rows', () => {
  const full: Move = {
    move: 1, label: 'a', comment: 'b', kind: 'press', target: 1, turn: 'signed', speed: 1, acceleration: 1, deceleration: 1, forceLimit: 1, approach: 1,
    pressSpeed: 1, window: 1, next: 1, dwell: 1,
  }
  const other: Move = {
    move: 1, label: 'c', comment: 'd', kind: 'absolute', target: 2, turn: 'shortest', speed: 2, acceleration: 2, deceleration: 2, forceLimit: 2, approach: 2,
    pressSpeed: 2, window: 2, next: 2, dwell: 2,
  }
  const allFields = [...moveFieldNames].sort()
  const compared = (before: Move | undefined, after: Move | undefined, agree?: () => boolean) => {
    const pass = new MovePass(sidesOf(emptyContent('rotary'), emptyContent('rotary'), {}), agree)
    pass.compare(before, 3, after, 4)
    return { fields: pass.changes().map(change => change.field).sort(), statements: pass.statements }
  }

  it('finds each field', () => {
    expect(compared(full, other)).toEqual({ fields: allFields, statements: moveFieldNames.length })
    for (const field of moveFieldNames) {
      expect(compared(full, { ...full, [field]: other[field] }).fields).toEqual([field])
      const { [field]: _, ...without } = full
      expect(compared(full, without as Move).fields).toEqual([field])
      expect(compared(without as Move, full).fields).toEqual([field])
    }
  })

  it('takes a row that comes or goes for one statement', () => {
    expect(compared(undefined, full)).toEqual({ fields: allFields, statements: 1 })
    expect(compared(full, undefined)).toEqual({ fields: allFields, statements: 1 })
  })

  it('leaves followers to who knows where rows went', () => {
    expect(compared(full, { ...full, next: 2 }, () => true)).toEqual({ fields: [], statements: 0 })
    expect(compared(full, full, () => false)).toEqual({ fields: ['next'], statements: 1 })
  })

  it('counts without making changes', () => {
    expect(countStatements([full], [full])).toBe(0)
    expect(countStatements([full], [other])).toBe(moveFieldNames.length)
    expect(countStatements([full], [{ ...full, move: 2 }])).toBe(2)
  })
})

describe('the passes over the other sections', () => {
  it('report what is in them and nothing of the others', () => {
    fc.assert(fc.property(arbitraryContent(), arbitraryContent(), (before, after) => {
      const sides = sidesOf(before, after, {})
      const sectionsOf = (push: (out: FieldChange[]) => void) => {
        const out: FieldChange[] = []
        push(out)
        return new Set(out.map(change => change.section))
      }
      expect([...sectionsOf(out => pushFileChanges(out, sides))]).toEqual(before.axisKind === after.axisKind ? [] : ['file'])
      for (const section of sectionsOf(out => pushSetupChanges(out, sides, () => []))) expect(section).toBe('setup')
      for (const section of sectionsOf(out => pushZoneChanges(out, sides))) expect(section).toBe('zone')
      for (const section of sectionsOf(out => pushExtraChanges(out, sides))) expect(section).toBe('extra')
    }), { numRuns: 50 })
  })

  it('see a setup whose keys stand in another order as the same', () => {
    const setup = (values: Content['setup']): Content => ({ ...emptyContent('linear'), setup: values })
    const out: FieldChange[] = []
    pushSetupChanges(out, sidesOf(setup({ jerk: 1, jogSpeed: 2 }), setup({ jogSpeed: 2, jerk: 1 }), {}), () => [])
    expect(out).toEqual([])
  })
})

describe('the order of a list', () => {
  it('is harm, motion, text, and within each as it came', () => {
    const change = (field: string, weight: FieldChange['weight']): FieldChange => ({ at: '', section: 'setup', field, weight, watched: false })
    const list = [change('a', 'text'), change('b', 'harm'), change('c', 'motion'), change('d', 'harm'), change('e', 'text')]
    expect(byWeight(list).map(one => one.field)).toEqual(['b', 'd', 'c', 'a', 'e'])
  })
})
