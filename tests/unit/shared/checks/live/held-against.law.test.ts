import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addressTwice } from '../../../../../shared/checks/live/address-twice'
import { harmValues } from '../../../../../shared/checks/live/sister-fields'
import { sisterMatrix, sisterOutlier, type Sister } from '../../../../../shared/checks/live/sister-outlier'
import { setupField } from '../../../../../shared/settings/fields'
import { axisFlags, type Content, type SetupFieldName } from '../../../../../shared/settings/types'
import { arbitraryContent } from '../../../../support/arbitrary-content'
import { linear } from '../../../../support/check-input'

/*
 * Laws of the rules that hold several axes against each other, over any contents that the format allows.
 */

const named = (contents: readonly Content[], flags: Sister['flags'] = []): Sister[] => contents.map((content, index) => ({ tag: `X-${index}`, content, flags }))
/** Sisters that are mostly alike: one content many times over, and a few of their own. */
const family = fc.tuple(arbitraryContent({ kind: 'linear', most: 4 }), fc.array(arbitraryContent({ kind: 'linear', most: 4 }), { maxLength: 2 }), fc.integer({ min: 3, max: 8 }), fc.subarray([...axisFlags]))
  .map(([common, own, times, flags]) => named([...Array.from({ length: times }, () => common), ...own], flags))

describe('harm values', () => {
  it('carry each key once, point at a value that is there, and never name what belongs to the place', () => {
    fc.assert(fc.property(arbitraryContent({ most: 5 }), fc.subarray([...axisFlags]), (content, flags) => {
      const values = harmValues(content, flags)
      expect(new Set(values.map(({ key }) => key)).size).toBe(values.length)
      for (const { key, at, value } of values) {
        expect(value).toBeDefined()
        const entry = setupField(key)
        if (entry) {
          expect([entry.weight, entry.carry === 'place']).toEqual(['harm', false])
          expect([at, content.setup[key as SetupFieldName]]).toEqual([`/setup/${key}`, value])
        }
      }
    }))
  })

  it('are only more on an axis with flags', () => {
    fc.assert(fc.property(arbitraryContent({ most: 5 }), (content) => {
      const bare = harmValues(content, [])
      expect(harmValues(content, ['gravity'])).toEqual(expect.arrayContaining(bare))
      expect(harmValues(content, ['gravity'])).toEqual(harmValues(content, ['press', 'collision']))
    }))
  })
})

describe('sisters', () => {
  it('that are all alike have nobody odd among them', () => {
    fc.assert(fc.property(arbitraryContent({ most: 5 }), fc.integer({ min: 0, max: 9 }), (content, times) => {
      expect(sisterOutlier.judge(named(Array.from({ length: times }, () => content)))).toEqual([])
    }))
  })

  it('mark just those that are warned of, and nobody of the many', () => {
    fc.assert(fc.property(family, (sisters) => {
      const marked = new Set(sisterMatrix(sisters).flatMap(({ odd }) => odd.map(index => sisters[index]!.tag)))
      const warned = new Set(sisterOutlier.judge(sisters).flatMap(({ axes }) => axes))
      expect(warned).toEqual(marked)
      for (const { odd } of sisterMatrix(sisters)) expect(odd.length * 5).toBeLessThanOrEqual(sisters.length)
    }))
  })

  it('stand apart by the same values in whatever order they are told', () => {
    const turned = family.chain(sisters => fc.tuple(fc.constant(sisters), fc.shuffledSubarray(sisters, { minLength: sisters.length })))
    fc.assert(fc.property(turned, ([sisters, other]) => {
      const apart = (list: readonly Sister[]) => sisterMatrix(list).flatMap(({ key, odd }) => odd.map(index => `${key} ${list[index]!.tag}`)).sort()
      expect(apart(other)).toEqual(apart(sisters))
    }))
  })

  it('point into the content of the one that stands apart', () => {
    fc.assert(fc.property(family, (sisters) => {
      for (const { at, axes, message, level } of sisterOutlier.judge(sisters)) {
        const content = sisters.find(({ tag }) => tag === axes[0])!.content
        const values = harmValues(content, sisters.flatMap(({ flags }) => flags)).map(value => value.at)
        for (const pointer of at) expect(values).toContain(pointer)
        expect([level, message.endsWith('.')]).toEqual(['warn', true])
      }
    }))
  })

  it('need four that agree: with three of them or fewer nobody is odd, whatever he has', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 0, max: 3 }), { maxLength: 12 }), (limits) => {
      const most = Math.max(0, ...limits.map(limit => limits.filter(other => other === limit).length))
      const warned = sisterOutlier.judge(named(limits.map(thrustLimit => linear({ thrustLimit })))).length
      const others = limits.length - most
      expect(warned).toBe(most >= 4 && others * 5 <= limits.length ? others : 0)
    }))
  })
})

describe('addresses', () => {
  const axes = fc.array(fc.record({ nodeAddress: fc.constantFrom(undefined, 0, 1, 2, 3), drive: fc.constantFrom(undefined, 'a', 'b') }), { maxLength: 8 })
    .map(list => list.map((one, index) => ({ tag: `X-${index}`, ...one })))

  it('are judged alike in whatever order, and name every axis that shares one', () => {
    fc.assert(fc.property(axes.chain(list => fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length }))), ([list, other]) => {
      const told = (bus: typeof list) => addressTwice.judge(bus).map(result => `${result.level} ${String(result.values.nodeAddress)} ${[...result.axes].sort().join()}`).sort()
      expect(told(other)).toEqual(told(list))
      for (const { level, axes: tags, values } of addressTwice.judge(list)) {
        if (level === 'stop') expect([...tags]).toEqual(list.filter(({ nodeAddress }) => nodeAddress === values.nodeAddress).map(({ tag }) => tag))
      }
    }))
  })

  it('are no trouble once each axis has its own', () => {
    fc.assert(fc.property(axes, (list) => {
      expect(addressTwice.judge(list.map((axis, index) => ({ ...axis, nodeAddress: index + 1 })))).toEqual([])
    }))
  })
})
