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

  it('knows the last two that were asked about, in whatever order', () => {
    const asked: string[] = []
    const reckon = onceFor(({ name }: { readonly name: string }) => {
      asked.push(name)
      return [name]
    })
    const [one, two, three] = [{ name: 'one' }, { name: 'two' }, { name: 'three' }]
    for (const given of [one, two, one, two, two, one, three, one, three, two]) expect(reckon(given)).toEqual([given.name])
    expect(asked).toEqual(['one', 'two', 'three', 'two'])
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
