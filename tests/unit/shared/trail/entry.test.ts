import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { acts, type Act } from '../../../../shared/trail/acts'
import { entrySchema, formatLeaf, parseLeaf, type Entry, type Json } from '../../../../shared/trail/entry'
import { canonicalJson } from '../../../../shared/settings/canonical'
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

  it('law: one member put in the place of another is read as the schema says', () => {
    const members = ['v', 'seq', 'at', 'actor', 'act', 'subject', 'state', 'note'] as const
    const odd = fc.oneof(jsonValue, fc.constantFrom<Json>(0, 1, -1, 1.5, 2 ** 53, '', null, true, [], {}, { kind: 'vault', name: 'x' }, { kind: 'vault', name: 1 }, { kind: 'person', id: 2, name: 'x' }, { kind: 'site', id: 0 }, { kind: 'site', id: 'x' }, { kind: 'site' }, 'site-changed'))
    fc.assert(fc.property(entries, fc.constantFrom(...members), odd, fc.boolean(), (each, member, value, more) => {
      const text = canonicalJson({ ...each, [member]: value, ...(more ? {} : { x: 1 }) })
      const parsed = entrySchema.safeParse(JSON.parse(text))
      if (!parsed.success) expect(codeOf(() => parseLeaf(text))).toBe('entry-unreadable')
      else if (acts[(parsed.data as Entry).act] === (parsed.data as Entry).subject.kind) expect(parseLeaf(text)).toEqual(parsed.data)
      else expect(codeOf(() => parseLeaf(text))).toBe('entry-subject')
    }), { numRuns: 500 })
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

/* One entry of each kind of actor, as text: the leaves of a vault are hashed, so not one byte of their form may move. */
describe('who did it', () => {
  const by = (actor: string) => leaf.replace('{"id":3,"kind":"person","name":"Runa Haldersen"}', actor)

  it.each([
    ['a person', '{"id":3,"kind":"person","name":"Runa Haldersen"}'],
    ['a token, with the person that it belongs to', '{"id":7,"kind":"token","name":"Night export","ownerId":3}'],
    ['the vault itself, which has no number', '{"kind":"vault","name":"Witnessmark"}'],
  ])('may be %s', (_, actor) => expect(formatLeaf(parseLeaf(by(actor)))).toBe(by(actor)))

  it.each([
    ['a person without a number', '{"kind":"person","name":"Runa Haldersen"}'],
    ['a number that is not whole', '{"id":3.5,"kind":"person","name":"Runa Haldersen"}'],
    ['number 0', '{"id":0,"kind":"person","name":"Runa Haldersen"}'],
    ['a token of nobody', '{"id":7,"kind":"token","name":"Night export"}'],
    ['a vault with a number', '{"id":1,"kind":"vault","name":"Witnessmark"}'],
    ['somebody without a name', '{"id":3,"kind":"person"}'],
    ['a key that nobody knows', '{"email":"r@larkfield.example","id":3,"kind":"person","name":"Runa Haldersen"}'],
  ])('is never %s', (_, actor) => expect(codeOf(() => parseLeaf(by(actor)))).toBe('entry-unreadable'))
})

describe('what it is about', () => {
  const of = (act: Act, subject: string) => leaf.replace('site-changed', act).replace('{"id":1,"kind":"site"}', subject)

  it('is named by a number, or by a text: contents by their hash', () => {
    const hash = 'b'.repeat(64)
    expect(parseLeaf(of('content-stored', `{"id":"${hash}","kind":"content"}`)).subject).toEqual({ kind: 'content', id: hash })
    expect(parseLeaf(of('axis-changed', '{"id":12,"kind":"axis"}')).subject).toEqual({ kind: 'axis', id: 12 })
    for (const id of ['0', '-1', '1.5', 'null', 'true']) expect(codeOf(() => parseLeaf(of('axis-changed', `{"id":${id},"kind":"axis"}`)))).toBe('entry-unreadable')
  })

  it('fits the act: every act goes with its own kind and with no other', () => {
    const kinds = [...new Set(Object.values(acts))]
    for (const [act, own] of Object.entries(acts) as [Act, string][]) {
      for (const kind of kinds) {
        const text = of(act, `{"id":1,"kind":"${kind}"}`)
        if (kind === own) expect(parseLeaf(text).act).toBe(act)
        else expect(codeOf(() => parseLeaf(text))).toBe('entry-subject')
      }
    }
  })

  it('says in the error what the act is about', () => {
    expect(() => parseLeaf(of('kit-taken', '{"id":1,"kind":"axis"}'))).toThrow('kit-taken is about a kit, not a axis.')
  })
})

describe('when and in which place', () => {
  it('is a moment of 24 characters, to the millisecond', () => {
    for (const at of ['2026-03-09T14:32:00Z', '2026-03-09T14:32:00.0000Z', '']) expect(codeOf(() => parseLeaf(leaf.replace('2026-03-09T14:32:00.000Z', at)))).toBe('entry-unreadable')
  })

  it('counts from 0, in whole numbers', () => {
    expect(parseLeaf(leaf.replace('"seq":41', '"seq":0')).seq).toBe(0)
    expect(codeOf(() => parseLeaf(leaf.replace('"seq":41', '"seq":0.5')))).toBe('entry-unreadable')
    expect(codeOf(() => parseLeaf(leaf.replace('"seq":41', '"seq":9007199254740993')))).toBe('entry-unreadable')
  })
})

describe('the state', () => {
  it('is an object, never a list or a bare value', () => {
    for (const state of ['[]', '"text"', '1', 'null']) expect(codeOf(() => parseLeaf(leaf.replace(/"state":\{.*?\}/, `"state":${state}`)))).toBe('entry-unreadable')
  })

  it('holds what a person wrote, in any script, and each spelling of it once', () => {
    const named = (name: string) => formatLeaf({ ...entry, state: { name } })
    for (const name of ['Lid "press" 2\\', 'Käserei Süd', 'ligne\n2', '生産ライン', '\u007f\u2028']) expect(parseLeaf(named(name)).state).toEqual({ name })
    expect(codeOf(() => parseLeaf(named('a/b').replace('a/b', 'a\\/b')))).toBe('entry-not-canonical')
  })

  it('keeps a number to its last digit', () => {
    for (const value of [0.1, 1e21, 5e-324, -123.456789, 9007199254740991]) expect(parseLeaf(formatLeaf({ ...entry, state: { value } })).state).toEqual({ value })
  })

  it('of two keys alike is refused, since JSON keeps but one of them', () => {
    expect(codeOf(() => parseLeaf(leaf.replace('"rev":2', '"rev":1,"rev":2')))).toBe('entry-not-canonical')
    expect(codeOf(() => parseLeaf(leaf.replace('"v":1', '"v":1,"v":1')))).toBe('entry-not-canonical')
  })
})
