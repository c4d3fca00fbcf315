import { describe, expect, it } from 'vitest'
import { pressRows, pushOf } from '../../../../shared/checks/presses'
import { absolute, press } from '../../../support/check-input'

describe('presses', () => {
  it('are the press rows in use, with their place in the table', () => {
    const rows = pressRows([absolute(0, 0), press(4, 1, 2), { ...press(5, 1, 2), speed: 0, acceleration: 0 }])
    expect(rows.map(({ move, index }) => [move.move, index])).toEqual([[4, 1]])
  })

  it('push from the approach towards the target', () => {
    expect([pushOf(press(1, 100, 150)), pushOf(press(1, 100, 50)), pushOf(press(1, 100, 100)), pushOf(absolute(1, 100))]).toEqual([1, -1, undefined, undefined])
  })
})
