import { describe, expect, it } from 'vitest'
import type { Axis } from '../../../../shared/api/versions'
import { busGroups, sisterGroups } from '../../../../utils/machine/sisters'
import { axis } from '../../../support/axis-answers'

const unit = axis.unit
const made = (id: number, tag: string, rest: Partial<Axis> = {}): Axis => ({ ...axis, id, tag, machine: { id, name: `machine ${id}` }, ...rest })
const tags = (groups: readonly { readonly axes: readonly Axis[] }[]) => groups.map(group => group.axes.map(one => one.tag))

describe('sister axes', () => {
  it('are those of one role and one model, in the order of their tags', () => {
    const site = [made(10, 'LID-10.Z'), made(2, 'LID-02.Z'), made(3, 'LID-03.Z', { role: 'Seat lid' }), made(4, 'LAB-01.X', { role: 'label' })]
    expect(tags(sisterGroups(2, site))).toEqual([['LID-02.Z', 'LID-03.Z', 'LID-10.Z']])
    expect(sisterGroups(2, site)[0]).toMatchObject({ role: 'seat lid', model: 'HL40-200V' })
  })

  it('leaves out another model, another kind, an empty role, an empty place and what was never read', () => {
    const site = [
      made(2, 'LID-02.Z'), made(3, 'LID-03.Z', { unit: unit && { ...unit, model: 'HR16' } }), made(4, 'LID-04.Z', { axisKind: 'rotary' }),
      made(5, 'LID-05.Z', { role: '' }), made(6, 'LID-06.Z', { unit: null }), made(7, 'LID-07.Z', { current: null }),
    ]
    expect(sisterGroups(2, site)).toEqual([])
    expect(sisterGroups(5, [made(5, 'A', { role: '' }), made(6, 'B', { role: '' })])).toEqual([])
  })

  it('are told only to a machine that has one of them', () => {
    expect(sisterGroups(9, [made(2, 'LID-02.Z'), made(3, 'LID-03.Z')])).toEqual([])
  })
})

describe('the buses of a machine', () => {
  it('have all axes of the site that hang on them; nobody shares a bus with no name', () => {
    const site = [made(2, 'B', { bus: 'bus-1' }), made(3, 'A', { bus: 'bus-1' }), made(4, 'C', { bus: 'bus-2' }), made(5, 'D', { bus: '' }), made(6, 'E', { bus: '' })]
    expect(tags(busGroups(2, site))).toEqual([['A', 'B']])
    expect(busGroups(4, site)).toEqual([])
    expect(busGroups(5, site)).toEqual([])
  })
})
