import { describe, expect, it } from 'vitest'
import { railSentence } from '../../../../utils/pictures/rail-words'
import { inputOf, lid, plate, usual } from '../../../support/lid-rail'

describe('railSentence', () => {
  it('says with numbers what the picture shows', () => {
    expect(railSentence(inputOf(lid(usual), plate))).toBe(
      'Rail between hard stops at 0 and 200 mm, soft limits 2 and 185. Moves: 0 at 5, 5 at 62, 1 at 70, 4 at 96.5, press 2 from 88 to 104, press 3 from 98 to 104. Move 8 steps by −2 mm. Zones 0 from 0 to 12.',
    )
  })
})
