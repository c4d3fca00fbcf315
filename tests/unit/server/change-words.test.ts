import { describe, expect, it } from 'vitest'
import { diffContents } from '#shared/diff/diff'
import type { Content } from '#shared/settings/types'
import { formatPlace, spokenPlace, valueWords } from '../../../server/services/change-words'

const move = { move: 5, kind: 'press', target: 120, approach: 100, speed: 200, acceleration: 1500, forceLimit: 40 } as const
const before: Content = { axisKind: 'linear', extra: { 'K-017': { value: 3, unit: 'counts' } }, moves: [move], setup: { thrustLimit: 38, jogSpeed: 20 }, zones: [{ zone: 2, from: 1, to: 5 }] }
const after: Content = {
  axisKind: 'linear', extra: { 'K-017': { value: 4, unit: 'counts' } }, moves: [{ ...move, forceLimit: 55, label: 'Press the lid home, slowly and until it clicks' }],
  setup: { thrustLimit: 55, speedLimit: 300 }, zones: [{ zone: 2, from: 1, to: 6 }],
}

describe('a change in words', () => {
  const changes = diffContents(before, after)

  it('stands where the format, or the screen, says', () => {
    expect(changes.map(formatPlace).sort()).toEqual(['extra K-017', 'jogSpeed', 'move 5 forceLimit', 'move 5 label', 'speedLimit', 'thrustLimit', 'zone 2 to'])
    expect(changes.map(spokenPlace).sort()).toEqual(['extra K-017', 'jog speed', 'move 5 force', 'move 5 label', 'speed limit', 'thrust limit', 'zone 2 to'])
  })

  it('says what it was and what it is, with its unit, or that it is gone', () => {
    const words = Object.fromEntries(changes.map(change => [formatPlace(change), valueWords(change)]))
    expect(words).toEqual({
      'extra K-017': '3 counts → 4 counts', 'jogSpeed': '20 mm/s taken away', 'move 5 forceLimit': '40 → 55 %', 'move 5 label': 'Press the lid home, slowly and until it…',
      'speedLimit': '300 mm/s', 'thrustLimit': '38 → 55 %', 'zone 2 to': '5 → 6 mm',
    })
  })
})
