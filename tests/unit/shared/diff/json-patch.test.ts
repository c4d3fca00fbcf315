import fc from 'fast-check'
import { applyPatch, getValueByPointer, type Operation } from 'fast-json-patch'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { jsonPatchOf } from '../../../../shared/diff/json-patch'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, ExtraValue, Move } from '../../../../shared/settings/types'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

const anyTwo = fc.oneof(arbitraryPair(), fc.tuple(arbitraryContent(), arbitraryContent()))
const linear = emptyContent('linear')
const move = (number: number, target: number): Move => ({ move: number, kind: 'absolute', target, speed: 250, acceleration: 2000 })
const moves = (...rows: Move[]): Content => ({ ...linear, moves: rows })
const extra = (values: Record<string, ExtraValue>): Content => ({ ...linear, extra: values })

describe('JSON Patch', () => {
  it('leads a general library from the first content to the second', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      const operations = structuredClone(jsonPatchOf(a, b)) as Operation[]
      expect(applyPatch(structuredClone(a), operations, true).newDocument).toEqual(b)
    }), { numRuns: 300 })
  })

  it('is empty between equal contents', () => {
    fc.assert(fc.property(arbitraryContent(), (a) => {
      expect(jsonPatchOf(a, structuredClone(a))).toEqual([])
    }), { numRuns: 50 })
  })

  it('says so by a removal where a value is no longer set: there is no null in it (unlike RFC 7396, where null means that)', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      expect(JSON.stringify(jsonPatchOf(a, b).map(operation => 'value' in operation ? operation.value : 0))).not.toMatch(/(?<![\w"])null(?![\w"])/)
    }), { numRuns: 100 })
    expect(jsonPatchOf({ ...linear, setup: { jogSpeed: 30 } }, linear)).toEqual([{ op: 'remove', path: '/setup/jogSpeed' }])
  })

  it('edits rows where they stand, then removes from the highest index down, then adds from the lowest up', () => {
    expect(jsonPatchOf(moves(move(1, 10), move(2, 20), move(4, 40), move(5, 50)), moves(move(0, 0), move(2, 21), move(3, 30)))).toEqual([
      { op: 'replace', path: '/moves/1/target', value: 21 },
      { op: 'remove', path: '/moves/3' },
      { op: 'remove', path: '/moves/2' },
      { op: 'remove', path: '/moves/0' },
      { op: 'add', path: '/moves/0', value: move(0, 0) },
      { op: 'add', path: '/moves/2', value: move(3, 30) },
    ])
  })
})

/* RFC 6902, appendix A: the examples whose operations occur here, with our keys for theirs. */
describe('the examples of RFC 6902', () => {
  it.each([
    ['A.1 adding an object member', extra({ foo: 'bar' }), extra({ foo: 'bar', baz: 'qux' }), [{ op: 'add', path: '/extra/baz', value: 'qux' }]],
    ['A.2 adding an array element', moves(move(0, 1), move(2, 3)), moves(move(0, 1), move(1, 2), move(2, 3)), [{ op: 'add', path: '/moves/1', value: move(1, 2) }]],
    ['A.3 removing an object member', extra({ foo: 'bar', baz: 'qux' }), extra({ foo: 'bar' }), [{ op: 'remove', path: '/extra/baz' }]],
    ['A.4 removing an array element', moves(move(0, 1), move(1, 2), move(2, 3)), moves(move(0, 1), move(2, 3)), [{ op: 'remove', path: '/moves/1' }]],
    ['A.5 replacing a value', extra({ baz: 'qux' }), extra({ baz: 'boo' }), [{ op: 'replace', path: '/extra/baz', value: 'boo' }]],
    ['A.10 adding a nested member', extra({}), extra({ child: { value: 1, unit: 'A' } }), [{ op: 'add', path: '/extra/child', value: { value: 1, unit: 'A' } }]],
    ['A.14 ~ escape ordering', extra({ '~1': 9 }), extra({ '~1': 10 }), [{ op: 'replace', path: '/extra/~01', value: 10 }]],
    ['A.15 strings are no numbers', extra({ '~1': 10 }), extra({ '~1': '10' }), [{ op: 'replace', path: '/extra/~01', value: '10' }]],
  ] as const)('%s', (_, before, after, operations) => {
    expect(jsonPatchOf(before, after)).toEqual(operations)
  })
})

/* RFC 6901, section 5. Of its keys the empty one and the single space cannot occur: extra keys have neither. */
describe('pointers', () => {
  it.each([
    ['a/b', '/extra/a~1b'], ['c%d', '/extra/c%d'], ['e^f', '/extra/e^f'], ['g|h', '/extra/g|h'], ['i\\j', '/extra/i\\j'], ['k"l', '/extra/k"l'], ['m~n', '/extra/m~0n'],
  ])('to %s are %s', (key, pointer) => {
    const after = extra({ [key]: 1 })
    expect(diffContents(linear, after).map(change => change.at)).toEqual([pointer])
    expect(getValueByPointer(after, pointer)).toBe(1)
  })

  it('lead to the value after, or before where it is gone, in both readings', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      for (const change of [...diffContents(a, b), ...diffRenumbered(a, b)?.changes ?? []]) {
        const [content, value] = change.after === undefined ? [a, change.before] : [b, change.after]
        expect(getValueByPointer(content, change.at)).toEqual(value)
      }
    }), { numRuns: 300 })
  })
})
