import { describe, expect, it } from 'vitest'
import { weigh } from '../../../../shared/checks/burden'
import { lapMeans, lapSentence, lapsOf } from '../../../../shared/checks/lap-rms'
import { thrustRms } from '../../../../shared/checks/thrust-rms'
import type { JudgeInput } from '../../../../shared/checks/types'
import { absolute, judgeInput, linear, plate } from '../../../support/check-input'

// 10 kg, 20 N at 2000 mm/s²; 100 mm at 250 mm/s take 0.525 s, 0.25 s of it on ramps.
const input = (rated: number, duty?: JudgeInput['axis']['duty']): JudgeInput => ({
  ...judgeInput(linear({ payloadMass: 9, mountingAngle: 0, frictionForce: 0 }, [absolute(1, 100, { next: 2 }), absolute(2, 0, { next: 1 })]), { nameplate: plate({ ratedThrust: rated, movingMass: 1, rotorInertia: 0, lead: 10 }) }),
  axis: { axisKind: 'linear', flags: [], ...(duty && { duty }) },
})
function told(of: JudgeInput, index = 0) {
  const lap = lapsOf(of).laps[index]
  const { burden } = weigh(of)
  if (!lap || !burden) throw new Error('no lap')
  const rated = of.nameplate?.ratedThrust ?? 0
  const mean = lapMeans(of, burden, rated)(lap)
  return { mean, words: lapSentence(lap, mean, burden, rated) }
}

describe('a lap in the mean', () => {
  it('is told below what its rule speaks of too: 13.801311 N are 69 % of 20 N', () => {
    const { mean, words } = told(input(20))
    expect(mean.thrust).toBeCloseTo(13.801311, 6)
    expect(mean.percent).toBeCloseTo(69.006556, 5)
    expect(words).toBe('Moves 1 and 2 without end need 13.8 N in the mean over 1.05 s, 69.01 % of the rated 20 N.')
    expect(thrustRms.judge(input(20))).toEqual([])
  })

  it('says what its rule says where that speaks', () => {
    const [found] = thrustRms.judge(input(12))
    const { mean, words } = told(input(12))
    expect(found?.message).toBe(words)
    expect(found?.values).toMatchObject({ rms: mean.thrust, percent: mean.percent, time: mean.time })
  })

  it('begins with the duty over its declared cycle: 20 N for 0.5 s of 4.2 s are √(200/4.2) = 6.900656 N', () => {
    const { mean, words } = told(input(20, { moves: [1, 2], cycleTime: 4200 }))
    expect(mean.thrust).toBeCloseTo(6.900656, 6)
    expect(mean.time).toBe(4.2)
    expect(words).toMatch(/^The duty needs 6\.901 N in the mean over 4\.2 s, 34\.5 % of the rated 20 N\.$/)
  })

  it('leaves out a duty that names rows which are not there, and names them', () => {
    const { laps, missing } = lapsOf(input(20, { moves: [1, 7], cycleTime: 4200 }))
    expect(missing).toEqual(['move 7'])
    expect(laps.map(({ certain, cycle }) => [certain, cycle])).toEqual([[true, undefined]])
  })
})

describe('laps that share rows', () => {
  const moves = [absolute(1, 100, { next: 3 }), absolute(2, 40, { next: 3 }), absolute(3, 10, { next: 4, dwell: 200 }), absolute(4, 180)]
  const axis = judgeInput(linear({ payloadMass: 9, mountingAngle: 0, frictionForce: 0 }, moves), { nameplate: plate({ ratedThrust: 20, movingMass: 1, rotorInertia: 0, lead: 10 }) })

  it('come out as each of them does by itself, in whatever order they are asked for', () => {
    const { burden } = weigh(axis)
    if (!burden) throw new Error('no burden')
    const { laps } = lapsOf(axis)
    expect(laps.map(({ rows }) => rows.map(({ move }) => move.move))).toEqual([[1, 3, 4], [2, 3, 4]])
    const alone = laps.map(lap => lapMeans(axis, burden, 20)(lap))
    const together = lapMeans(axis, burden, 20)
    expect([...laps].reverse().map(together).reverse()).toEqual(alone)
    expect(laps.map(together)).toEqual(alone)
    expect(alone[0]?.time).not.toBe(alone[1]?.time)
  })
})
