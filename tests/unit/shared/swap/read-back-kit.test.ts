import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { hashesOf } from '../../../../shared/settings/hash'
import { moveRow } from '../../../../shared/settings/move-row'
import { contentOfText } from '../../../../shared/settings/stored-content'
import { canonicalText } from '../../../../shared/settings/canonical'
import type { Content, Setup } from '../../../../shared/settings/types'
import { kitOf } from '../../../../shared/swap/kit'
import { compareReadBack, taughtMissing, type ReadBackCase } from '../../../../shared/swap/read-back'
import type { KitContent } from '../../../../shared/swap/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, linear, plate, press } from '../../../support/check-input'

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest()
const code = (content: Content) => hashesOf(content, sha256).scribeCode
const kitFrom = (content: Content, more: Partial<KitContent> = {}): KitContent => ({ content, adjustments: [], carried: [], teach: [], prove: [], taughtSetup: [], taughtExtra: [], ...more })
const compare = (kit: KitContent, readBack: Content, more: Partial<ReadBackCase> = {}) => compareReadBack(kit, readBack, { sameUnit: false, accepted: [], context: {}, ...more }, sha256)

const setup: Setup = { softLimitMin: 0, softLimitMax: 180, thrustLimit: 38, homeOffset: 2, homingMethod: 'hard-stop', softLimitsActive: true }
const content = linear(setup, [absolute(0, 0, { label: 'home', window: 0.1 }), absolute(1, 120, { window: 0.1, next: 0, dwell: 200 })], { extra: { 'K-1': 5, 'K-2': 'B' }, zones: [{ zone: 1, from: 10, to: 20 }, { zone: 2, from: 30, to: 40 }] })
const kit = kitFrom(content)
/** As readers and the vault hand contents over: every row in the one shape, with undefined for what is not set. */
const asRead = (one: Content): Content => ({ ...one, moves: one.moves.map(moveRow) })

describe('keys that the unit has no place for', () => {
  const lacking = (field: 'label' | 'window' | 'dwell') => asRead({ ...content, moves: content.moves.map(move => ({ ...move, [field]: undefined })) })

  it('a field that no row has any more, in rows as they are read: undefined is not there', () => {
    expect(compare(kit, lacking('window'))).toMatchObject({ verdict: 'differs', differences: [], missingKeys: [{ key: 'move.window', weight: 'motion', accepted: false }] })
    expect(compare(kit, lacking('window'), { accepted: ['move.window'] })).toMatchObject({ verdict: 'same', differences: [], missingKeys: [{ accepted: true }], scribeCode: code(content) })
    const stored = contentOfText(canonicalText({ ...content, moves: content.moves.map(({ label: _label, ...move }) => move) }))
    expect(compare(kit, stored).missingKeys).toEqual([{ key: 'move.label', weight: 'text', accepted: false }])
  })

  it('is named once, however many rows lack it', () => expect(compare(kit, lacking('window')).missingKeys).toHaveLength(1))

  it('one row that lost it is a value to write again, while another row has it', () => {
    const partly = asRead({ ...content, moves: content.moves.map(move => move.move === 1 ? { ...move, window: undefined } as unknown as typeof move : move) })
    expect(compare(kit, partly, { accepted: ['move.window'] })).toMatchObject({ verdict: 'differs', missingKeys: [], differences: [{ section: 'move', row: 1, field: 'window', before: 0.1 }] })
  })

  it('what every row needs is never a gap, nor what the unit holds besides', () => {
    const more = { ...content, setup: { ...setup, jogSpeed: 20 }, extra: { ...content.extra, 'K-9': 1 } }
    expect(compare(kit, more)).toMatchObject({ verdict: 'differs', missingKeys: [] })
    expect(compare(kit, more).differences.map(({ field, before }) => [field, before])).toEqual([['jogSpeed', undefined], ['K-9', undefined]])
  })

  it('of setup and extra, accepted by name one at a time', () => {
    const { thrustLimit: _limit, ...rest } = setup
    const without = { ...content, setup: rest, extra: { 'K-2': 'B' } }
    expect(compare(kit, without).missingKeys.map(({ key, weight, accepted }) => [key, weight, accepted])).toEqual([['thrustLimit', 'harm', false], ['extra:K-1', 'motion', false]])
    expect(compare(kit, without, { accepted: ['thrustLimit'] }).verdict).toBe('differs')
    expect(compare(kit, without, { accepted: ['K-1', 'thrustLimit'] }).verdict).toBe('differs')
    expect(compare(kit, without, { accepted: ['extra:K-1', 'thrustLimit'] }).verdict).toBe('same')
  })

  it('an empty key is no key: a setup value that became another is written again', () => {
    expect(compare(kit, { ...content, setup: { ...setup, thrustLimit: 0 } }, { accepted: ['thrustLimit'] })).toMatchObject({ verdict: 'differs', missingKeys: [], differences: [{ field: 'thrustLimit', before: 38, after: 0 }] })
  })
})

describe('rows that the unit lacks', () => {
  it('are named by their own numbers, zones first; rows that it has besides are differences', () => {
    const one = { ...content, zones: content.zones.slice(1), moves: [content.moves[1] ?? absolute(1, 0), absolute(7, 5)] }
    const read = compare(kit, one, { accepted: ['move.label'] })
    expect(read.rowsMissing).toEqual([{ section: 'zone', row: 1 }, { section: 'move', row: 0 }])
    expect(read.verdict).toBe('differs')
    expect(new Set(read.differences.map(({ section, row }) => `${section} ${row}`))).toEqual(new Set(['zone 1', 'move 0', 'move 7']))
  })

  it('none: an empty table against an empty table', () => expect(compare(kitFrom(linear()), linear())).toMatchObject({ verdict: 'identical', rowsMissing: [] }))
})

describe('the code of a read-back', () => {
  it('is that of the kit with what differs laid over it', () => {
    const wrong = { ...content, setup: { ...setup, thrustLimit: 40 } }
    expect(compare(kit, wrong).scribeCode).toBe(code(wrong))
    expect(code(wrong)).not.toBe(code(content))
  })

  it('takes the kit’s value where the difference is within tolerance, beside one that is not', () => {
    const nameplate = plate({ resolution: 0.02, shownDigit: 0.01 })
    const near = (target: number, thrustLimit: number) => ({ ...content, setup: { ...setup, thrustLimit }, moves: content.moves.map(move => move.move === 1 ? { ...move, target } : move) })
    expect(compare(kit, near(120.01, 40), { nameplate }).scribeCode).toBe(code(near(120, 40)))
    expect(compare(kit, near(120.01, 38), { nameplate }).scribeCode).toBe(code(content))
  })

  it('leaves out what the kit does not hold and is to be taught', () => {
    const taught = kitFrom(content, { taughtSetup: ['positionGain'], taughtExtra: ['K-7'] })
    const read = compare(taught, { ...content, setup: { ...setup, positionGain: 40 }, extra: { ...content.extra, 'K-7': 1 } })
    expect(read).toMatchObject({ verdict: 'same', scribeCode: code(content) })
    expect(read.aside.map(({ field }) => field)).toEqual(['positionGain', 'K-7'])
  })

  it('none for a home offset alone, which no code holds; the code of the rest where more differs', () => {
    const moved = { ...content, setup: { ...setup, homeOffset: 9 } }
    expect(compare(kit, moved, { sameUnit: true }).scribeCode).toBeNull()
    const both = { ...moved, setup: { ...moved.setup, thrustLimit: 40 } }
    expect(compare(kit, both, { sameUnit: true }).scribeCode).toBe(code(both))
    expect(compare(kit, moved).scribeCode).toBe(code(content))
  })
})

describe('any kit and any read-back', () => {
  const pair = fc.tuple(arbitraryContent({ kind: 'linear', most: 3 }), arbitraryContent({ kind: 'linear', most: 3 }), fc.boolean(), fc.boolean())
  it('agree in their codes exactly where nothing is to be written again; every key differs, is within, set aside or missing', () => fc.assert(fc.property(pair, ([one, other, alike, sameUnit]) => {
    const kitOfOne = kitOf(one, { replaced: 'unit', ownValues: false, out: { model: 'A', firmware: '1' }, into: { model: 'A', firmware: '2' } })
    const readBack = asRead(alike ? { ...one, setup: { ...one.setup, homeOffset: 3 } } : other)
    const read = compare(kitOfOne, readBack, { sameUnit })
    const own = code(kitOfOne.content)
    expect(read.scribeCode === own).toBe(read.verdict !== 'differs')
    const missing = new Set(read.missingKeys.map(({ key }) => key))
    const accounted = [...read.differences, ...read.within, ...read.aside].map(({ at }) => at)
    const all = diffContents(kitOfOne.content, readBack)
    for (const { at, section, field } of all) {
      const key = section === 'setup' ? field : section === 'extra' ? `extra:${field}` : `move.${field}`
      expect(accounted.includes(at) || missing.has(key), at).toBe(true)
    }
    expect(accounted.length).toBeLessThanOrEqual(all.length)
  }), { numRuns: 40 }))

  it('of the same content are identical, in the rows of a kit or in those of a reader', () => fc.assert(fc.property(arbitraryContent({ most: 3 }), (one) => {
    expect(compare(kitFrom(one), asRead(one))).toMatchObject({ verdict: 'identical', differences: [], missingKeys: [], rowsMissing: [], scribeCode: code(one) })
  }), { numRuns: 40 }))
})

describe('a press kit with the values of another unit', () => {
  it('is read back against its own values, not those of the known-good', () => {
    const known = linear({ ...setup, thrustLimit: 38 }, [press(4, 120, 150, { forceLimit: 38 })])
    const out = { model: 'A', nameplate: plate({ model: 'A', ratedThrust: 400 }) }
    const fitted = kitOf(known, { replaced: 'unit', ownValues: false, out, into: { model: 'B', nameplate: plate({ model: 'B', ratedThrust: 640 }) } })
    expect(compare(fitted, known).differences.map(({ at, before, after }) => [at, before, after])).toEqual([['/setup/thrustLimit', 23.75, 38], ['/moves/0/forceLimit', 23.75, 38]])
    expect(compare(fitted, fitted.content).verdict).toBe('identical')
  })
})

describe('what is still to be taught', () => {
  it('0 and false are taught; a key inherited from nowhere is not', () => {
    const of = { taughtSetup: ['homeOffset', 'brakeFitted'], taughtExtra: ['K-1', 'constructor'] } as const
    expect(taughtMissing(of, linear({ homeOffset: 0, brakeFitted: false }, [], { extra: { 'K-1': 0 } }), [])).toEqual(['extra:constructor'])
    expect(taughtMissing(of, linear(), ['extra:K-1', 'brakeFitted'])).toEqual(['homeOffset', 'extra:constructor'])
  })
})
