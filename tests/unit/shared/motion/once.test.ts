import { describe, expect, it } from 'vitest'
import { onceFor } from '../../../../shared/motion/once'

describe('onceFor', () => {
  it('reckons once for an object, and again for another that is equal to it', () => {
    const asked: number[][] = []
    const doubled = onceFor((numbers: number[]) => {
      asked.push(numbers)
      return numbers.map(number => 2 * number)
    })
    const numbers = [1, 2]
    expect(doubled(numbers)).toEqual([2, 4])
    expect(doubled(numbers)).toBe(doubled(numbers))
    expect(doubled([1, 2])).not.toBe(doubled(numbers))
    expect(asked).toHaveLength(2)
  })

  it('asks again after a failure: nothing is kept of it', () => {
    let fails = true
    const reckon = onceFor((given: object) => {
      if (fails) throw new Error('not yet')
      return [given]
    })
    const given = {}
    expect(() => reckon(given)).toThrow('not yet')
    fails = false
    expect(reckon(given)).toEqual([given])
  })
})
