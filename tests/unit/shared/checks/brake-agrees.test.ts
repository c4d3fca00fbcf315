import { describe, expect, it } from 'vitest'
import { brakeAgrees } from '../../../../shared/checks/brake-agrees'
import { judgeInput, linear, plate, told } from '../../../support/check-input'

const agrees = (set?: boolean, built?: boolean) => judgeInput(linear({ brakeFitted: set }), { nameplate: plate({ brakeFitted: built }) })

// Two values of two each: the four pairs are all there is, and the border lies between them.
describe('brake-agrees', () => {
  it('is silent where drive and unit say the same', () => {
    expect(told(brakeAgrees, agrees(true, true))).toEqual([])
    expect(told(brakeAgrees, agrees(false, false))).toEqual([])
  })

  it('stops where they do not', () => {
    expect(told(brakeAgrees, agrees(true, false))).toEqual(['stop: The drive is set to handle a brake, the unit has none.'])
    expect(told(brakeAgrees, agrees(false, true))).toEqual(['stop: The unit has a brake, the drive is set to handle none.'])
    expect(brakeAgrees.judge(agrees(false, true))).toMatchObject([{ at: ['/setup/brakeFitted'], values: { set: 'false', nameplate: 'true' } }])
  })

  it('takes false for an answer and only what is not given for none: the border of what is known', () => {
    expect(told(brakeAgrees, agrees(false, false))).toEqual([])
    expect(told(brakeAgrees, agrees(undefined, false))[0]).toMatch(/^unknown/)
    expect(told(brakeAgrees, agrees(false, undefined))[0]).toMatch(/^unknown/)
  })

  it('names what is missing', () => {
    expect(told(brakeAgrees, agrees(undefined, true))).toEqual(['unknown: Whether drive and unit agree about the brake cannot be judged without brakeFitted.'])
    expect(brakeAgrees.judge(agrees(false))[0]!.missing).toEqual(['nameplate.brakeFitted'])
    expect(brakeAgrees.judge(judgeInput(linear()))[0]!.missing).toEqual(['brakeFitted', 'nameplate.brakeFitted'])
  })
})
