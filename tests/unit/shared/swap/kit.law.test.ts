import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Content } from '../../../../shared/settings/types'
import type { CarryCase } from '../../../../shared/swap/carried'
import { kitOf } from '../../../../shared/swap/kit'
import { forceFields } from '../../../../shared/swap/rescale'
import { replacedParts } from '../../../../shared/swap/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { plate } from '../../../support/check-input'

const firmware = fc.option(fc.constantFrom('1', '2'), { nil: undefined })
const nameplate: fc.Arbitrary<Nameplate | undefined> = fc.option(fc.record({
  ratedThrust: fc.constantFrom(200, 400, 640), peakThrust: fc.constant(900), homeOffsetSense: fc.constantFrom('zero-is-home-plus-offset' as const, 'home-reads-offset' as const),
  dictionary: fc.constantFrom<Nameplate['dictionary']>({}, { 'K-017': { carry: 'teach' }, 'Filter': { carry: 'prove' } }),
}).map(rest => plate(rest)), { nil: undefined })
const side = fc.record({ model: fc.constantFrom('A', 'B'), firmware, nameplate }).map(({ model, firmware, nameplate }) => ({ model, ...firmware === undefined ? {} : { firmware }, ...nameplate ? { nameplate } : {} }))
const swaps: fc.Arbitrary<CarryCase> = fc.record({ replaced: fc.constantFrom(...replacedParts), out: side, into: side, ownValues: fc.boolean() })
const swapped = (holds: (content: Content, swap: CarryCase) => void) => () => fc.assert(fc.property(arbitraryContent({ most: 4 }), swaps, holds), { numRuns: 60 })
/** `extra:KEY` for the drive's own, as a kit names what is taught. */
const nameOf = ({ section, field }: { readonly section: string, readonly field: string }) => section === 'extra' ? `extra:${field}` : field

describe('a kit', () => {
  it('lacks what is to be taught and nothing else, and differs only where it says so', swapped((content, swap) => {
    const kit = kitOf(content, swap)
    const changes = diffContents(content, kit.content)
    expect(changes.filter(({ after }) => after === undefined).map(nameOf).sort()).toEqual([...kit.teach].sort())
    expect(changes.filter(({ after }) => after !== undefined).map(({ at, before, after }) => [at, before, after]).sort())
      .toEqual(kit.adjustments.map(({ at, before, after }) => [at, before, after]).sort())
  }))

  it('accounts for each value that the content holds, once', swapped((content, swap) => {
    const { carried, teach, prove, taughtSetup, taughtExtra } = kitOf(content, swap)
    const named = carried.map(({ section, field = '' }) => `${section}/${field}`)
    expect(new Set(named).size).toBe(named.length)
    expect(named.filter(name => /^(setup|extra)/.test(name)).sort()).toEqual([...Object.keys(content.setup).map(name => `setup/${name}`), ...Object.keys(content.extra).map(key => `extra/${key}`)].sort())
    expect([...teach, ...prove].sort()).toEqual(carried.filter(({ carry }) => carry === 'teach' || carry === 'prove').map(({ section, field = '' }) => nameOf({ section, field })).sort())
    expect([...taughtSetup, ...taughtExtra.map(key => `extra:${key}`)]).toEqual(teach)
  }))

  it('of a unit’s own values is the content as it is', swapped((content, swap) => {
    expect(kitOf(content, { ...swap, ownValues: true })).toMatchObject({ content, adjustments: [], teach: [], prove: [] })
  }))

  it('goes back to where it came from, what was taught aside: a kit of the kit adjusts the same values again', swapped((content, swap) => {
    const there = kitOf(content, { ...swap, ownValues: false })
    // A percentage that ends at the largest number of the format has lost where it came from.
    fc.pre([...forceFields.map(name => there.content.setup[name]), ...there.content.moves.map(({ forceLimit }) => forceLimit)].every(percent => percent !== 1e9))
    const back = kitOf(there.content, { ...swap, ownValues: false, out: swap.into, into: swap.out })
    expect(back.adjustments.map(({ at }) => at).filter(at => !there.adjustments.some(adjusted => adjusted.at === at))).toEqual([])
  }))
})
