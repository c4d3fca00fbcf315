import { describe, expect, it } from 'vitest'
import { diffRenumbered } from '../../../shared/diff/renumber'
import { diffContents } from '../../../shared/diff/diff'
import type { Content } from '../../../shared/settings/types'
import { changedRuns, pairPositionLines, pairSpeedLines } from '../../../utils/motion-pairs'
import { pairRows, pairSentence } from '../../../utils/words/motion-pair'
import { flatPairs, tellMoves } from '../../../utils/words/moves-told'
import { after, axis, before, nameplate } from '../../support/axis-answers'

const plate = { ...nameplate, movingMass: 1, rotorInertia: 0, lead: 10 }
function pairsOf(was: Content, is: Content, duty = axis.duty) {
  const told = diffRenumbered(was, is, {})
  const rows = tellMoves(was, is, told?.pairs ?? flatPairs(was, is), told?.changes ?? diffContents(was, is, {}), told?.renumbered ?? [])
  return changedRuns(rows, { content: was, axis: { ...axis, duty }, nameplate: plate }, { content: is, axis: { ...axis, duty }, nameplate: plate })
}
const edit = (content: Content, number: number, rest: object): Content => ({ ...content, moves: content.moves.map(move => move.move === number ? { ...move, ...rest } : move) })

describe('changedRuns', () => {
  it('brings moves that changed first, then those that set off elsewhere, under their new numbers', () => {
    const keys = pairsOf(before, after).map(({ key, before: was }) => `${key} was ${was.run.key}`)
    expect(keys[0]).toBe('move 1 was move 1')
    expect(keys).toContain('move 2 was move 2')
    expect(keys.some(key => key.startsWith('move 7'))).toBe(false)
  })

  it('finds the chain that a changed move belongs to, however its rows are numbered', () => {
    const shifted: Content = { ...before, moves: [...before.moves.slice(0, 3), { ...before.moves[2]!, move: 3 }, ...before.moves.slice(3).map(move => ({ ...move, move: move.move + 1, ...(move.next !== undefined && { next: move.next + 1 }) }))] }
    const found = pairsOf(before, edit(shifted, 5, { speed: 100 }))
    expect(found.map(({ key, before: was }) => `${key} was ${was.run.key}`)).toEqual(expect.arrayContaining(['move 5 was move 4', 'chain 4 was chain 3']))
  })

  it('holds the duty against itself, and knows no pair where nothing moves', () => {
    const duty = { moves: [0, 1], cycleTime: 4000 }
    expect(pairsOf(before, edit(before, 1, { speed: 300 }), duty).at(-1)?.key).toBe('duty')
    expect(pairsOf(before, edit(before, 1, { label: 'Over the lid' }))).toEqual([])
  })

  it('shows a changed limit by what it leaves, where nothing moves differently', () => {
    const pairs = pairsOf(before, { ...before, setup: { ...before.setup, thrustLimit: 55 } })
    expect(pairs.length).toBeGreaterThan(3)
    const one = pairs[0]!
    const rows = pairRows(one, 'mm')
    // 38 % and 55 % of 640 N.
    expect(rows.find(({ label }) => label === 'its limit')).toMatchObject({ before: 243.2, after: 352, unit: 'N' })
    expect(rows.filter(({ label }) => label === 'time')).toEqual([])
  })

  it('draws a limit of before only where it lies elsewhere', () => {
    const [one] = pairsOf(before, { ...edit(before, 1, { speed: 300 }), setup: { ...before.setup, speedLimit: 350 } })
    expect(one && pairSpeedLines(one).map(({ word, at }) => `${word} ${at}`)).toEqual(['speed limit before 400', 'speed limit 350'])
    expect(one && pairPositionLines(one).filter(({ tone }) => tone === 'before')).toEqual([])
    expect(one && pairPositionLines(one)).toContainEqual({ at: 88, word: 'press approach' })
  })
})

describe('what a changed movement comes to', () => {
  // 57 mm down at 250 mm/s and 2000 mm/s² take 0.353 s. 7.5 kg at −90° weigh 73.55 N; braking takes 15 N more at 2000 mm/s², 18.75 N at 2500, and friction helps with 25 N.
  const [pair] = pairsOf(before, edit(before, 1, { acceleration: 2500 }))
  if (!pair) throw new Error('move 1 changed')

  it('is said in one sentence with numbers', () => {
    expect(pairSentence(pair)).toMatch(/^It takes at least 0\.328 s, before 0\.353 s, and needs at most 67\.3 N, 28 % of its limit of 243\.2 N; before 63\.5 N, 27 % of its limit of 243\.2 N\.$/)
  })

  it('stands in rows, each before and after', () => {
    const rows = Object.fromEntries(pairRows(pair, 'mm').map(({ label, before: was, after: is }) => [label, [was, is]]))
    expect(rows).toMatchObject({ 'distance': [57, 57], 'time, at least': [0.353, 0.328], 'most thrust': [63.5, 67.3], 'its limit': [243.2, 243.2], 'of that limit': [27, 28] })
    expect(Object.keys(rows)).not.toContain('mean thrust, begun again and again')
  })
})
