import { describe, expect, it } from 'vitest'
import { byNumber, rowNames } from '../../../../../shared/checks/live/sister-rows'
import { diffRenumbered } from '../../../../../shared/diff/renumber'
import type { Content } from '../../../../../shared/settings/types'
import { absolute, linear } from '../../../../support/check-input'

const pairsOf = (model: Content, content: Content) => diffRenumbered(model, content)?.pairs
const tableOf = (...targets: number[]) => linear({}, targets.map((target, index) => absolute(index + 1, target)))
const namesOf = (contents: Content[], index: number) => contents[index]!.moves.map(({ move }) => rowNames(contents, pairsOf)[index]!(move))
const common = tableOf(10, 20, 30, 40)

describe('names of rows among sisters', () => {
  it('are their numbers where every row keeps its own, edited or not', () => {
    expect(namesOf([common, tableOf(10, 25, 30, 40), common], 1)).toEqual([1, 2, 3, 4].map(byNumber))
    expect(rowNames([], pairsOf)).toEqual([])
  })

  it('are those of the table that most have: 10, 15, 20 … has one added behind move 1', () => {
    const list = [tableOf(10, 15, 20, 30, 40), common, common]
    expect(namesOf(list, 0)).toEqual([
      { key: 'move 1', number: '1' },
      { key: 'move added after 1, 1', number: '2', here: 'move 2 (added)' },
      { key: 'move 2', number: '2', here: 'move 3 (2 on the others)' },
      { key: 'move 3', number: '3', here: 'move 4 (3 on the others)' },
      { key: 'move 4', number: '4', here: 'move 5 (4 on the others)' },
    ])
    expect(namesOf(list, 1)).toEqual([1, 2, 3, 4].map(byNumber))
  })

  it('count several added ones, those before the first row too, and are never shared by two rows of an axis', () => {
    const list = [common, common, tableOf(5, 6, 10, 20, 30, 40)]
    expect(namesOf(list, 2).map(({ key }) => key)).toEqual(['move added after the start, 1', 'move added after the start, 2', 'move 1', 'move 2', 'move 3', 'move 4'])
  })
})
