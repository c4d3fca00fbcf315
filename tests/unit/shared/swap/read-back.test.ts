import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { hashesOf } from '../../../../shared/settings/hash'
import type { Content } from '../../../../shared/settings/types'
import { compareReadBack, taughtMissing, type ReadBackCase } from '../../../../shared/swap/read-back'
import type { KitContent } from '../../../../shared/swap/types'

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest()
const kitContent: Content = {
  axisKind: 'linear', extra: { 'K-1': 5 }, zones: [{ zone: 1, from: 10, to: 20 }], setup: { softLimitMin: 0, softLimitMax: 180, thrustLimit: 38, homeOffset: 2 },
  moves: [{ move: 0, kind: 'absolute', target: 0, speed: 100, acceleration: 1000, label: 'home', window: 0.1 }, { move: 1, kind: 'absolute', target: 120, speed: 100, acceleration: 1000 }],
}
const kit = (more: Partial<KitContent> = {}): KitContent => ({ content: kitContent, adjustments: [], carried: [], teach: [], prove: [], taughtSetup: [], taughtExtra: [], ...more })
const usual: ReadBackCase = { sameUnit: false, accepted: [], context: {}, nameplate: { model: 'A', axisKind: 'linear', stroke: 200, resolution: 0.02, shownDigit: 0.01 } }
const compare = (readBack: Content, more: Partial<ReadBackCase> = {}, of = kit()) => compareReadBack(of, readBack, { ...usual, ...more }, sha256)
const own = hashesOf(kitContent, sha256).scribeCode

describe('a read-back against the kit', () => {
  it('that holds the same is identical, with the kit’s code', () => expect(compare(kitContent)).toMatchObject({ verdict: 'identical', scribeCode: own, missingKeys: [], rowsMissing: [] }))

  it('within half a count and half a digit is the same, and its code is the kit’s', () => {
    // 0.01 + 0.005 mm of a position that weighs motion; of a soft limit not more than one digit, 0.01 mm.
    const near = (target: number, softLimitMax = 180): Content => ({ ...kitContent, setup: { ...kitContent.setup, softLimitMax }, moves: kitContent.moves.map(move => move.move === 1 ? { ...move, target } : move) })
    expect(compare(near(120.015))).toMatchObject({ verdict: 'same', scribeCode: own, within: [{ field: 'target' }] })
    expect(compare(near(120.016)).verdict).toBe('differs')
    expect(compare(near(120, 180.01)).verdict).toBe('same')
    expect(compare(near(120, 180.011)).verdict).toBe('differs')
  })

  it('sets aside what is taught, extra too, and the home offset of another unit', () => {
    const taught = kit({ content: { ...kitContent, extra: {}, setup: { ...kitContent.setup, softLimitMin: undefined } as Content['setup'] }, taughtSetup: ['positionGain'], taughtExtra: ['K-1'] })
    const clean = kit({ ...taught, content: { ...kitContent, extra: {} } })
    const read = compare({ ...kitContent, setup: { ...kitContent.setup, homeOffset: 9, positionGain: 40 } }, {}, clean)
    expect(read).toMatchObject({ verdict: 'same', differences: [] })
    expect(read.aside.map(({ field }) => field).sort()).toEqual(['K-1', 'homeOffset', 'positionGain'])
  })

  it('of the same unit compares the home offset, for which no code stands', () => {
    expect(compare({ ...kitContent, setup: { ...kitContent.setup, homeOffset: 9 } }, { sameUnit: true })).toMatchObject({ verdict: 'differs', differences: [{ field: 'homeOffset', before: 2, after: 9 }], scribeCode: null })
  })

  it('without keys names them: of setup, of extra, and of a column that no row has', () => {
    const { thrustLimit: _gone, ...setup } = kitContent.setup
    const lacking: Content = { ...kitContent, extra: {}, setup, moves: kitContent.moves.map(({ window: _window, label: _label, ...move }) => move) }
    const read = compare(lacking)
    expect(read).toMatchObject({ verdict: 'differs', differences: [] })
    expect(read.missingKeys.map(({ key, weight }) => [key, weight]).sort()).toEqual([['extra:K-1', 'motion'], ['move.label', 'text'], ['move.window', 'motion'], ['thrustLimit', 'harm']])
    const accepted = ['thrustLimit', 'extra:K-1', 'move.label']
    expect(compare(lacking, { accepted }).verdict).toBe('differs')
    expect(compare(lacking, { accepted: [...accepted, 'move.window'] })).toMatchObject({ verdict: 'same', scribeCode: own })
  })

  it('of a table written in part names the rows', () => {
    const read = compare({ ...kitContent, zones: [], moves: kitContent.moves.slice(0, 1) })
    expect(read).toMatchObject({ verdict: 'differs', rowsMissing: [{ section: 'zone', row: 1 }, { section: 'move', row: 1 }], missingKeys: [] })
  })

  it('its code agrees with the kit’s exactly where it does not differ', () => fc.assert(fc.property(
    fc.record({ thrustLimit: fc.constantFrom(38, 40), target: fc.constantFrom(120, 120.01, 121), homeOffset: fc.constantFrom(2, 3), extra: fc.constantFrom<Content['extra']>({ 'K-1': 5 }, {}, { 'K-1': 5, 'K-2': 1 }), sameUnit: fc.boolean() }),
    ({ thrustLimit, target, homeOffset, extra, sameUnit }) => {
      const read = compare({ ...kitContent, extra, setup: { ...kitContent.setup, thrustLimit, homeOffset }, moves: kitContent.moves.map(move => move.move === 1 ? { ...move, target } : move) }, { sameUnit })
      expect(read.scribeCode === own).toBe(read.verdict !== 'differs')
    },
  )))
})

describe('values to be taught', () => {
  it('are missing until the unit shows them, keys that the firmware lacks aside', () => {
    const of = { taughtSetup: ['homeOffset', 'positionGain'], taughtExtra: ['K-9'] } as const
    expect(taughtMissing(of, kitContent, [])).toEqual(['positionGain', 'extra:K-9'])
    expect(taughtMissing(of, kitContent, ['positionGain'])).toEqual(['extra:K-9'])
  })
})
