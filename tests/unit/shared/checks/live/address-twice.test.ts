import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addressTwice, type BusAxis } from '../../../../../shared/checks/live/address-twice'
import { tell } from '../../../../support/check-input'

const axis = (tag: string, nodeAddress?: number, drive?: string): BusAxis => ({ tag, nodeAddress, drive })
const bus = (...axes: BusAxis[]) => addressTwice.judge(axes).map(tell)

describe('address-twice', () => {
  it('is silent where every drive has its own', () => {
    expect(bus(axis('LID-01.Z', 21), axis('LID-02.Z', 26), axis('LID-03.Z', 27))).toEqual([])
  })

  it('stops two drives with one address, and names all that share it', () => {
    const axes = [axis('LID-01.Z', 26), axis('LID-02.Z', 26), axis('LID-03.Z', 7), axis('LID-04.Z', 26), axis('LID-05.Z', 7)]
    expect(bus(...axes)).toEqual([
      'stop: LID-03.Z and LID-05.Z answer to one address on this bus: 7.',
      'stop: LID-01.Z, LID-02.Z and LID-04.Z answer to one address on this bus: 26.',
    ])
    expect(addressTwice.judge(axes)[0]).toMatchObject({
      rule: 'address-twice', at: ['/setup/nodeAddress'], axes: ['LID-03.Z', 'LID-05.Z'], values: { nodeAddress: 7, axes: ['LID-03.Z', 'LID-05.Z'] },
    })
  })

  it('takes 0 for no address, and 1 for one: the border', () => {
    expect(bus(axis('A', 0), axis('B', 0))).toEqual([])
    expect(bus(axis('A', 1), axis('B', 1))).toHaveLength(1)
  })

  it('lets the channels of one drive share its address', () => {
    expect(bus(axis('A', 5, 'HL40-1'), axis('B', 5, 'HL40-1'))).toEqual([])
    expect(bus(axis('A', 5, 'HL40-1'), axis('B', 5, 'HL40-1'), axis('C', 5, 'HL40-2'))).toEqual(['stop: A, B and C answer to one address on this bus: 5.'])
    expect(bus(axis('A', 5), axis('B', 5))).toHaveLength(1)
  })

  it('names the axes whose address is missing, as long as there is anybody to share with', () => {
    expect(bus(axis('A'), axis('B', 5))).toEqual(['unknown: Whether A shares an address on this bus cannot be judged without nodeAddress.'])
    expect(addressTwice.judge([axis('A'), axis('B')])).toMatchObject([{ missing: ['nodeAddress'], axes: ['A', 'B'] }])
    expect(bus(axis('A'))).toEqual([])
    expect(bus()).toEqual([])
  })

  it('stops once for each address that is given more than once', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 1, max: 8 }), { maxLength: 12 }), (addresses) => {
      const given = new Map<number, number>()
      for (const address of addresses) given.set(address, (given.get(address) ?? 0) + 1)
      const twice = [...given].filter(([, count]) => count > 1).map(([address]) => address).sort((a, b) => a - b)
      const axes = addresses.map((address, index) => axis(`X-${index}`, address))
      expect(addressTwice.judge(axes).map(({ values }) => values.nodeAddress)).toEqual(twice)
    }))
  })
})
