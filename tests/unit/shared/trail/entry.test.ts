import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { acts, isAct, type Act } from '../../../../shared/trail/acts'
import { formatLeaf, parseLeaf, type Entry, type Json } from '../../../../shared/trail/entry'
import { codeOf } from '../../../support/codes'

const entry: Entry = {
  v: 1, seq: 41, at: '2026-03-09T14:32:00.000Z', actor: { kind: 'person', id: 3, name: 'Runa Haldersen' }, act: 'site-changed',
  subject: { kind: 'site', id: 1 }, state: { name: 'Larkfield Preserves', fourEyes: true, rev: 2 }, note: null,
}
const leaf = '{"act":"site-changed","actor":{"id":3,"kind":"person","name":"Runa Haldersen"},"at":"2026-03-09T14:32:00.000Z","note":null,"seq":41,"state":{"fourEyes":true,"name":"Larkfield Preserves","rev":2},"subject":{"id":1,"kind":"site"},"v":1}'

const jsonValue = fc.letrec<{ value: Json }>(tie => ({
  value: fc.oneof({ maxDepth: 3 }, fc.string({ unit: 'grapheme' }), fc.double({ noNaN: true, noDefaultInfinity: true }), fc.integer(), fc.boolean(), fc.constant(null),
    fc.array(tie('value'), { maxLength: 4 }), fc.dictionary(fc.string({ unit: 'grapheme', maxLength: 8 }).filter(key => key !== '__proto__'), tie('value'), { maxKeys: 4, noNullPrototype: true })),
})).value
const entries = fc.record({
  v: fc.constant(1 as const), seq: fc.nat(), at: fc.date({ min: new Date(0), max: new Date('2100-01-01'), noInvalidDate: true }).map(date => date.toISOString()),
  actor: fc.oneof(
    fc.record({ kind: fc.constant('person' as const), id: fc.integer({ min: 1 }), name: fc.string() }),
    fc.record({ kind: fc.constant('token' as const), id: fc.integer({ min: 1 }), name: fc.string(), ownerId: fc.integer({ min: 1 }) }),
    fc.record({ kind: fc.constant('vault' as const), name: fc.string() }),
  ),
  act: fc.constantFrom(...Object.keys(acts) as Act[]), id: fc.oneof(fc.integer({ min: 1 }), fc.string()),
  state: fc.dictionary(fc.string({ maxLength: 8 }).filter(key => key !== '__proto__'), jsonValue, { noNullPrototype: true }), note: fc.option(fc.string({ unit: 'grapheme' })),
}).map(({ id, ...rest }): Entry => ({ ...rest, subject: { kind: acts[rest.act], id } }))

describe('a log entry', () => {
  it('is the text that its file describes', () => {
    expect(formatLeaf(entry)).toBe(leaf)
    expect(parseLeaf(leaf)).toEqual(entry)
  })

  it('reads back what was written, whatever the state', () => {
    fc.assert(fc.property(entries, (each) => {
      const text = formatLeaf(each)
      expect(formatLeaf(parseLeaf(text))).toBe(text)
    }))
  })

  it('is one text: keys in another order, white space and other spellings of a number are refused', () => {
    const other = [leaf.replace('{"act"', '{ "act"'), leaf.replace('"seq":41', '"seq":41.0'), leaf.replace('"seq":41', '"seq":4.1e1'), leaf.replace('Runa', 'R\\u0075na'), `${leaf.slice(0, -7)},"v":1}`.replace(',,', ','), leaf.replace('{"act":"site-changed",', '{').replace(',"v":1}', ',"v":1,"act":"site-changed"}')]
    const codes = other.filter(text => text !== leaf).map(text => codeOf(() => parseLeaf(text)))
    expect(codes.length).toBeGreaterThan(4)
    expect(new Set(codes)).toEqual(new Set(['entry-not-canonical']))
  })

  it.each([
    ['', 'entry-unreadable'], ['[]', 'entry-unreadable'],
    [leaf.replace('site-changed', 'site-painted'), 'entry-unreadable'],
    [leaf.replace('"kind":"site"', '"kind":"axis"'), 'entry-subject'],
    [leaf.replace('"kind":"site"', '"kind":"garden"'), 'entry-unreadable'],
    [leaf.replace('"v":1', '"v":2'), 'entry-unreadable'],
    [leaf.replace('"note":null', '"extra":1,"note":null'), 'entry-unreadable'],
    [leaf.replace('"seq":41', '"seq":-1'), 'entry-unreadable'],
    [leaf.replace('"kind":"person"', '"kind":"ghost"'), 'entry-unreadable'],
  ])('refuses %s', (text, code) => { expect(codeOf(() => parseLeaf(text))).toBe(code) })

  it('refuses to write what has no canonical form', () => {
    for (const value of [undefined, Number.NaN, Number.POSITIVE_INFINITY, '\ud800', new Date(0)]) {
      expect(codeOf(() => formatLeaf({ ...entry, state: { value } as unknown as Entry['state'] }))).toBe('not-canonical')
    }
  })
})

describe('acts', () => {
  it('are told from other words, those of every object too', () => {
    expect(isAct('version-stored')).toBe(true)
    for (const word of ['version-stord', 'toString', 'constructor', '__proto__', '']) expect(isAct(word)).toBe(false)
  })

  it('are each about one kind of subject', () => {
    for (const [act, kind] of Object.entries(acts)) expect(kind, act).toMatch(/^[a-z][a-z-]*$/)
  })
})
