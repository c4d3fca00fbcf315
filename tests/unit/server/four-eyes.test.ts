import { describe, expect, it } from 'vitest'
import type { Content, Move, Setup } from '#shared/settings/types'
import { harmBroughtIn, type RunVersion } from '../../../server/services/known-good/four-eyes'

const runa = { id: 1, name: 'Runa Haldersen' }
const tobias = { id: 2, name: 'Tobias Achterberg' }

const content = (setup: Setup, moves: readonly Move[] = []): Content => ({ axisKind: 'linear', extra: {}, moves, setup, zones: [] })
const at = (number: number, broughtBy: RunVersion['broughtBy'], holds: Content): RunVersion => ({ number, broughtBy, content: holds })
const named = (result: ReturnType<typeof harmBroughtIn>) => result.map(({ change, version }) => `${change.field} v${version.number} ${version.broughtBy.name}`)

const press: Move = { move: 5, kind: 'press', target: 120, approach: 100, speed: 200, acceleration: 1500, forceLimit: 40 }

describe('who brought in a harm value', () => {
  const v1 = at(1, runa, content({ thrustLimit: 38, speedLimit: 300 }))

  it('is the one of the version in which the value first stood', () => {
    const v2 = at(2, tobias, content({ thrustLimit: 55, speedLimit: 300 }))
    const v3 = at(3, runa, content({ thrustLimit: 55, speedLimit: 300, smoothingTime: 4 }))
    expect(named(harmBroughtIn(v3, [v2, v1], v1.content, {}))).toEqual(['thrustLimit v2 Tobias Achterberg'])
  })

  it('is the later one where the run was broken', () => {
    const v2 = at(2, tobias, content({ thrustLimit: 55, speedLimit: 300 }))
    const v3 = at(3, tobias, content({ thrustLimit: 38, speedLimit: 300 }))
    const v4 = at(4, runa, content({ thrustLimit: 55, speedLimit: 300 }))
    expect(named(harmBroughtIn(v4, [v3, v2, v1], v1.content, {}))).toEqual(['thrustLimit v4 Runa Haldersen'])
  })

  it('leaves out motion and text, and what the known-good holds too', () => {
    const v2 = at(2, runa, content({ thrustLimit: 38, speedLimit: 300, smoothingTime: 9, inPositionTime: 5 }))
    expect(harmBroughtIn(v2, [v1], v1.content, {})).toEqual([])
  })

  it('counts the motion fields of moves on a flagged axis', () => {
    const before = at(1, runa, content({}, [press]))
    const after = at(2, tobias, content({}, [{ ...press, target: 125 }]))
    expect(harmBroughtIn(after, [before], before.content, {})).toEqual([])
    expect(named(harmBroughtIn(after, [before], before.content, { flags: ['press'] }))).toEqual(['target v2 Tobias Achterberg'])
  })

  it('counts a value that came back from before the known-good by its last unbroken run', () => {
    const v2 = at(2, tobias, content({ thrustLimit: 55, speedLimit: 300 }))
    const v3 = at(3, tobias, content({ thrustLimit: 38, speedLimit: 300 }))
    expect(named(harmBroughtIn(v3, [v2, v1], v2.content, {}))).toEqual(['thrustLimit v3 Tobias Achterberg'])
    expect(named(harmBroughtIn(v1, [], v2.content, {}))).toEqual(['thrustLimit v1 Runa Haldersen'])
  })

  it('without a known-good counts every harm value but those of the beginning', () => {
    const v2 = at(2, tobias, content({ thrustLimit: 55, speedLimit: 300 }))
    const v3 = at(3, tobias, content({ thrustLimit: 55, speedLimit: 300, jogSpeed: 20 }))
    expect(harmBroughtIn(v1, [], null, {})).toEqual([])
    expect(named(harmBroughtIn(v3, [v2, v1], null, {}))).toEqual(['jogSpeed v3 Tobias Achterberg', 'thrustLimit v2 Tobias Achterberg'])
  })

  it('carries what stands there, not what was taken away', () => {
    const v2 = at(2, runa, content({ thrustLimit: 38 }))
    expect(harmBroughtIn(v2, [v1], v1.content, {})).toEqual([])
  })

  it('compares a value with its unit', () => {
    const dictionary = { 'K-017': { weight: 'harm' as const } }
    const withExtra = (unit: string): Content => ({ ...content({}), extra: { 'K-017': { value: 3, unit } } })
    const a = at(1, runa, withExtra('counts'))
    const b = at(2, tobias, withExtra('mm'))
    const c = at(3, runa, withExtra('mm'))
    expect(named(harmBroughtIn(c, [b, a], a.content, { dictionary }))).toEqual(['K-017 v2 Tobias Achterberg'])
  })

  it('reads no more versions than it needs', () => {
    const v2 = at(2, tobias, content({ thrustLimit: 55, speedLimit: 300 }))
    const older = (function* () {
      yield v1
      throw new Error('read too far')
    })()
    expect(named(harmBroughtIn(v2, older, content({ thrustLimit: 30, speedLimit: 300 }), {}))).toEqual(['thrustLimit v2 Tobias Achterberg'])
  })
})
