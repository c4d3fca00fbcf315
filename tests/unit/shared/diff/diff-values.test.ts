import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { pushExtraChanges, pushFileChanges, pushSetupChanges, pushZoneChanges } from '../../../../shared/diff/diff-values'
import { diffContents } from '../../../../shared/diff/diff'
import { sidesOf } from '../../../../shared/diff/sides'
import type { DiffContext, FieldChange } from '../../../../shared/diff/types'
import { emptyContent } from '../../../../shared/settings/content'
import { setupFieldNames } from '../../../../shared/settings/fields'
import type { Content, ExtraValue, Move, Setup, Zone } from '../../../../shared/settings/types'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

const linear = emptyContent('linear')
const told = (push: (out: FieldChange[]) => void): FieldChange[] => {
  const out: FieldChange[] = []
  push(out)
  return out
}
const setupChanges = (before: Setup, after: Setup, partners: readonly (readonly [Move, Move])[] = []) =>
  told(out => pushSetupChanges(out, sidesOf({ ...linear, setup: before }, { ...linear, setup: after }, {}), () => partners))
const zoneChanges = (before: readonly Zone[], after: readonly Zone[]) => told(out => pushZoneChanges(out, sidesOf({ ...linear, zones: before }, { ...linear, zones: after }, {})))
const extraChanges = (before: Content['extra'], after: Content['extra'], context: DiffContext = {}) =>
  told(out => pushExtraChanges(out, sidesOf({ ...linear, extra: before }, { ...linear, extra: after }, context)))

describe('setup values', () => {
  it('come in the order of the table, whatever the order of their keys', () => {
    const after: Setup = { nodeAddress: 3, jogSpeed: 30, softLimitMax: 9, brakeFitted: true }
    expect(setupChanges({}, after).map(change => change.field)).toEqual(['softLimitMax', 'jogSpeed', 'brakeFitted', 'nodeAddress'])
    expect(setupChanges(after, {}).map(change => change.at)).toEqual(['/setup/softLimitMax', '/setup/jogSpeed', '/setup/brakeFitted', '/setup/nodeAddress'])
  })

  it('are the same in another order of keys', () => {
    expect(setupChanges({ jogSpeed: 30, jerk: 5 }, { jerk: 5, jogSpeed: 30 })).toEqual([])
    expect(setupChanges({ jogSpeed: 30, jerk: 5 }, { jerk: 6, jogSpeed: 30 }).map(change => change.field)).toEqual(['jerk'])
  })

  it('are told apart where one value stands under another key', () => {
    expect(setupChanges({ jogSpeed: 30 }, { pressSpeed: 30 }).map(({ field, before, after }) => [field, before, after])).toEqual([['jogSpeed', 30, undefined], ['pressSpeed', undefined, 30]])
    expect(setupChanges({ jogSpeed: 30 }, { jogSpeed: 30, pressSpeed: 30 }).map(change => change.field)).toEqual(['pressSpeed'])
    expect(setupChanges({ jogSpeed: 30, pressSpeed: 30 }, { jogSpeed: 30 }).map(change => change.field)).toEqual(['pressSpeed'])
  })

  it.each(setupFieldNames)('%s is looked at', (name) => {
    const value = (text: string) => ({ [name]: text }) as Setup
    expect(setupChanges(value('a'), value('b'))).toMatchObject([{ at: `/setup/${name}`, field: name, before: 'a', after: 'b' }])
    expect(setupChanges({}, value('b'))).toMatchObject([{ field: name, after: 'b' }])
  })
})

describe('a changed press speed', () => {
  const press = (move: number, more: Partial<Move> = {}): Move => ({ move, kind: 'press', target: 1, speed: 1, acceleration: 1, forceLimit: 5, approach: 0, ...more })
  const affected = (...partners: (readonly [Move, Move])[]) => setupChanges({ pressSpeed: 8 }, { pressSpeed: 9 }, partners)[0]?.affects

  it('names the presses that go by it, by their numbers in the second content, ascending', () => {
    expect(affected([press(7), press(9)], [press(1), press(2)], [press(3), press(10)])).toEqual([2, 9, 10])
  })

  it('names none that has a speed of its own on either side, and none that is no press', () => {
    expect(affected([press(1, { pressSpeed: 4 }), press(1)], [press(2), press(2, { pressSpeed: 4 })], [press(3), { ...press(3), kind: 'absolute' }])).toBeUndefined()
  })

  it('is the only setup value that names moves', () => {
    const partners = [[press(1), press(1)]] as const
    for (const name of setupFieldNames) expect(setupChanges({}, { [name]: 5 } as Setup, partners)[0]?.affects, name).toEqual(name === 'pressSpeed' ? [1] : undefined)
  })

  it('names those that go by it when it comes and when it goes', () => {
    expect(setupChanges({}, { pressSpeed: 9 }, [[press(1), press(1)]])[0]?.affects).toEqual([1])
    expect(setupChanges({ pressSpeed: 9 }, {}, [[press(1), press(1)]])[0]?.affects).toEqual([1])
  })
})

describe('zones', () => {
  const zone = (number: number, from: number, to: number): Zone => ({ zone: number, from, to })

  it('pair by number; places go by the side where the zone stands', () => {
    expect(zoneChanges([zone(1, 0, 5), zone(3, 10, 20)], [zone(3, 10, 25), zone(4, 30, 40)]).map(({ at, row, before, after }) => [at, row, before, after])).toEqual([
      ['/zones/0/from', 1, 0, undefined], ['/zones/0/to', 1, 5, undefined],
      ['/zones/0/to', 3, 20, 25],
      ['/zones/1/from', 4, undefined, 30], ['/zones/1/to', 4, undefined, 40],
    ])
  })

  it('that are the same say nothing', () => expect(zoneChanges([zone(1, 0, 5)], [zone(1, 0, 5)])).toEqual([]))
})

describe('values of the drive', () => {
  it('come by code unit, those that came and those that went among each other', () => {
    expect(extraChanges({ b: 1, Z: 1 }, { a: 1, ä: 1, B: 1 }).map(change => change.field)).toEqual(['B', 'Z', 'a', 'b', 'ä'])
  })

  it('do not hang on the order of their keys', () => {
    expect(extraChanges({ a: 1, b: { value: 2, unit: 'A' } }, { b: { unit: 'A', value: 2 }, a: 1 })).toEqual([])
  })

  it('are told by key also where a name is that of every object', () => {
    expect(extraChanges({}, { toString: 1 } as unknown as Content['extra']).map(change => change.at)).toEqual(['/extra/toString'])
    expect(extraChanges({ constructor: 1 } as unknown as Content['extra'], {}).map(({ before, after }) => [before, after])).toEqual([[1, undefined]])
  })

  it.each([
    [15, 16, true], [15, 15, false], [15, '15', true], [1, true, true], ['', '', false], ['a', 'A', true],
    [{ value: 1, unit: 'A' }, { value: 1, unit: 'A' }, false], [{ value: 1, unit: 'A' }, { value: 1, unit: 'mA' }, true], [{ value: 1, unit: 'A' }, 1, true],
  ] as readonly (readonly [ExtraValue, ExtraValue, boolean])[])('from %j to %j is a change: %s', (before, after, changed) => {
    expect(extraChanges({ K: before }, { K: after })).toHaveLength(changed ? 1 : 0)
    expect(extraChanges({ K: before, L: 1 }, { K: after, L: 1 })).toHaveLength(changed ? 1 : 0)
  })

  it('are watched where the site added them, by their key', () => {
    const watched = ['extra:K-017', 'K-018', 'jogSpeed']
    expect(extraChanges({}, { 'K-017': 1, 'K-018': 1, 'jogSpeed': 1 }, { watched }).map(change => change.watched)).toEqual([true, false, false])
  })
})

describe('the axis kind', () => {
  it('is one change, which says nothing of the other sections', () => {
    const fileChanges = (before: Content, after: Content) => told(out => pushFileChanges(out, sidesOf(before, after, {})))
    expect(fileChanges(linear, emptyContent('rotary'))).toMatchObject([{ at: '/axisKind', section: 'file', before: 'linear', after: 'rotary', weight: 'harm', watched: true }])
    expect(fileChanges(linear, { ...linear, setup: { jogSpeed: 1 } })).toEqual([])
  })
})

/* A reader lays keys down in one order and a person's program in another: what differs must not hang on it. */
describe('the order of keys', () => {
  const reversed = <Value>(value: Value): Value => Array.isArray(value)
    ? value.map(reversed) as Value
    : typeof value === 'object' && value !== null ? Object.fromEntries(Object.entries(value).map(([key, each]) => [key, reversed(each)] as const).reverse()) as Value : value

  it('is no difference, anywhere in a content', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(diffContents(content, reversed(content))).toEqual([])
    }), { numRuns: 60 })
  })

  it('changes nothing in what is told of two contents, on either side', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      const plain = diffContents(a, b)
      expect(diffContents(reversed(a), b)).toEqual(plain)
      expect(diffContents(a, reversed(b))).toEqual(plain)
    }), { numRuns: 60 })
  })
})
