import { describe, expect, it } from 'vitest'
import { atExtra, atMove, atSetup, atZone } from '../../../../shared/checks/pointers'
import { absolute } from '../../../support/check-input'

describe('pointers', () => {
  it('point into the canonical content, rows by index', () => {
    const row = { move: absolute(7, 0), index: 2 }
    expect([atSetup('thrustLimit'), atMove(row), atMove(row, 'target'), atZone(0, 'from')])
      .toEqual(['/setup/thrustLimit', '/moves/2', '/moves/2/target', '/zones/0/from'])
  })

  it('escape keys as RFC 6901, section 5 shows: a/b and m~n', () => {
    expect([atExtra('a/b'), atExtra('m~n'), atExtra('~/~')]).toEqual(['/extra/a~1b', '/extra/m~0n', '/extra/~0~1~0'])
  })
})
