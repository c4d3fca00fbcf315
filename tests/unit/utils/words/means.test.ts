import { describe, expect, it } from 'vitest'
import type { CheckResult } from '../../../../shared/checks/types'
import { diffContents } from '../../../../shared/diff/diff'
import type { FieldChange } from '../../../../shared/diff/types'
import type { Content } from '../../../../shared/settings/types'
import { differenceWords } from '../../../../utils/words/difference'
import { absentWord, changeWords, extraWords, placeWords, rowWords, setupWords, valueWord } from '../../../../utils/words/fields'
import { checksByLine, meansOf, rowSummary } from '../../../../utils/words/means'
import { after, before, nameplate } from './lid-press'

const context = { axisKind: 'linear', nameplate, before, after } as const
const changes = diffContents(before, after)
const change = (section: string, field: string, row?: number): FieldChange => {
  const found = changes.find(one => one.section === section && one.field === field && one.row === row)
  if (!found) throw new Error(`no change of ${section} ${field} ${String(row)}`)
  return found
}
const between = (first: Partial<Content['setup']>, second: Partial<Content['setup']>) => {
  const [was, is] = [{ ...before, setup: first }, { ...before, setup: second }]
  return diffContents(was, is).map(one => meansOf(one, { ...context, before: was, after: is }))
}

describe('differenceWords', () => {
  it('gives points for percentages, distance for places, percent for the rest', () => {
    expect(differenceWords(change('setup', 'thrustLimit'))).toBe('+17 points')
    expect(differenceWords(change('move', 'target', 1))).toBe('+8 mm')
    expect(differenceWords(change('move', 'speed', 1))).toBe('+28 %')
    expect(differenceWords(change('setup', 'inPositionWindow'))).toBe('+100 %')
  })
  it('says added and removed, and nothing of words', () => {
    expect(differenceWords(change('move', 'deceleration', 1))).toBe('added')
    expect(differenceWords({ ...change('move', 'deceleration', 1), before: 2000, after: undefined })).toBe('removed')
    expect(differenceWords(change('move', 'label', 2))).toBe('')
  })
  it('writes a true minus, and a small percentage with its digits', () => {
    expect(differenceWords({ ...change('move', 'speed', 1), percent: -4.25 })).toBe('−4.3 %')
    expect(differenceWords({ ...change('setup', 'thrustLimit'), points: -1 })).toBe('−1 point')
  })
})

describe('meansOf', () => {
  it('puts the newtons first where a percentage could mislead', () => {
    expect(meansOf(change('setup', 'thrustLimit'), context)).toBe('243.2 N became 352 N.')
    expect(meansOf(change('move', 'forceLimit', 2), context)).toBe('204.8 N became 230.4 N.')
  })
  it('leaves the newtons out where the nameplate does not say what 100 % is', () => {
    expect(meansOf(change('setup', 'thrustLimit'), { ...context, nameplate: undefined })).toBe('Most thrust or torque either way, of the rated one.')
  })
  it('tells how near a target comes to the press after it', () => {
    expect(meansOf(change('move', 'target', 1), context)).toBe('Ends 18 mm before the approach of press 2, was 26 mm.')
  })
  it('tells how near it comes to a soft limit where no press follows', () => {
    const moved: Content = { ...before, moves: before.moves.map(move => move.move === 5 ? { ...move, target: 3 } : move) }
    const target = diffContents(before, moved)[0]
    expect(target && meansOf(target, { ...context, after: moved })).toBe('Ends 1 mm from the soft limit of 2 mm, was 3 mm.')
  })
  it('says that a default written out brakes as before', () => {
    expect(meansOf(change('move', 'deceleration', 1), context)).toBe('Written out, and the same braking as before.')
  })
  it('says what tuning wants', () => {
    expect(meansOf(change('setup', 'positionGain'), context)).toBe('Speed asked for per deviation. Prove at the machine.')
  })
  it('says when the next step may start', () => {
    expect(meansOf(change('setup', 'inPositionWindow'), context)).toBe('The next step may start 0.05 mm earlier.')
  })
  it('tells the travel that soft limits leave, and when they are no longer held', () => {
    expect(between({ softLimitMin: 2, softLimitMax: 185 }, { softLimitMin: 2, softLimitMax: 190 })).toEqual(['Travel between the soft limits is 188 mm, was 183 mm. Goes by the place, not by the unit.'])
    expect(between({ softLimitMin: 2, softLimitsActive: true }, { softLimitMin: 2, softLimitsActive: false })).toEqual(['The drive no longer holds the soft limits.'])
  })
  it('names the moves that a setup default reaches', () => {
    expect(between({ pressSpeed: 20 }, { pressSpeed: 30 })).toEqual(['Speed of the slow part of a press that names none of its own. Changes move 2, which names none of its own.'])
  })
  it('says nothing of a label', () => {
    expect(meansOf(change('move', 'label', 2), context)).toBe('')
  })
})

describe('words of fields', () => {
  it('says of what a percentage is', () => {
    expect(setupWords('thrustLimit', context)).toMatchObject({ label: 'thrust limit', unit: '% of rated' })
    expect(setupWords('velocityFeedForward', context).unit).toBe('%')
    expect(rowWords('move', 'forceLimit', { ...context, nameplate: { ...nameplate, forceBase: 'peak-thrust' } }).unit).toBe('% of peak')
  })
  it('takes the unit of the axis kind', () => {
    expect(setupWords('speedLimit', { axisKind: 'rotary' }).unit).toBe('deg/s')
    expect(setupWords('inPositionWindow', context)).toMatchObject({ unit: 'mm', plusMinus: true })
  })
  it('spells a move’s field out and says where it stands', () => {
    expect(changeWords(change('move', 'deceleration', 1), context).label).toBe('deceleration')
    expect(placeWords(change('move', 'target', 1))).toBe('move 1')
    expect(placeWords(change('setup', 'thrustLimit'))).toBe('setup, force')
  })
  it('names an extra value by its dictionary, else by its key', () => {
    expect(extraWords('K-017', { 'K-017': { name: 'servo filter', unit: 'Hz' } })).toEqual({ label: 'servo filter (K-017)', unit: 'Hz', plusMinus: false })
    expect(extraWords('K-018', undefined).label).toBe('K-018')
    expect(extraWords('constructor', {}).label).toBe('constructor')
  })
  it('explains coded values and absent ones', () => {
    expect(valueWord('inputSwitching', 'n')).toBe('n, pulls to 0 V')
    expect(valueWord('speedLimit', 400)).toBe(400)
    expect(absentWord(change('move', 'deceleration', 1))).toBe('as acceleration')
    expect(absentWord(change('setup', 'thrustLimit'))).toBeUndefined()
  })
  it('sums up a whole row', () => {
    expect(rowSummary({ ...after.moves[3] }, context)).toBe('98 to 104 mm, 36 % of rated')
    expect(rowSummary({ ...after.moves[0] }, context)).toBe('to 5 mm, 250 mm/s')
    expect(rowSummary({ from: 98, to: 106 }, context)).toBe('98 to 106 mm')
  })
})

describe('checksByLine', () => {
  const stop: CheckResult = { rule: 'site-rule', level: 'stop', at: ['/setup/thrustLimit'], message: 'The site allows 45 %.', values: {} }
  const warn: CheckResult = { rule: 'select-reach', level: 'warn', at: ['/moves/3'], message: 'Move 3 cannot be called.', values: {} }
  const lines = [{ key: 'a', ats: ['/setup/thrustLimit'] }, { key: 'b', ats: ['/moves/3/kind', '/moves/3/target'] }]
  it('puts each at the first place it hits', () => {
    expect(checksByLine(lines, [stop, warn], [])).toEqual(new Map([['a', [stop]], ['b', [warn]]]))
  })
  it('leaves out what stood there before, and what is worth only a note', () => {
    expect(checksByLine(lines, [stop, { ...warn, level: 'note' }], [stop]).size).toBe(0)
  })
})
