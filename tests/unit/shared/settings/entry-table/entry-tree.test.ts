import { describe, expect, it } from 'vitest'
import { EntryTree } from '../../../../../shared/settings/entry-table/entry-tree'
import { Problems } from '../../../../../shared/settings/problems'
import type { RawNode } from '../../../../../shared/settings/raw'
import { liftTable } from '../../../../support/entry-table'

const plain = (node: RawNode): unknown => {
  if (node.kind === 'object') return Object.fromEntries(node.keys.map((key, index) => [key, plain(node.values[index] as RawNode)]))
  if (node.kind === 'list') return node.items.map(plain)
  return node.kind === 'cell' ? node.text + node.unit : node.kind
}

function treeOf(lines: readonly string[], known: Partial<Record<'serial' | 'model', string>> = {}) {
  const problems = new Problems({ place: ({ offset }) => ({ line: offset, column: 1 }), shown: () => 'cell' })
  const tree = new EntryTree(liftTable, 'linear', problems, ({ offset }, cell) => offset * 100 + cell)
  lines.forEach((line, index) => tree.add({ cells: line.split(';'), offset: index + 1 }))
  for (const field of ['serial', 'model'] as const) tree.addKnown('unit', field, known[field])
  return { tree, plain: plain(tree.root), told: () => problems.outcome().errors.map(error => `${error.code} ${error.at} ${error.line}`) }
}

describe('EntryTree', () => {
  it('is the tree of the neutral form, in neutral words', () => {
    const { plain: tree, told } = treeOf(['K-001;;1;', 'K-003;;-2,5;mm', 'K-9;;x;', 'Output;On from;On to', '01;10;25', 'Step;Mode;Pos;Vel;Acc;Name;Force;Slow at;Then', '2;P;1500;10;2;;30;12;-'])
    expect(tree).toEqual({
      setup: { positiveDirection: 'retract', softLimitMin: '-2.5' }, extra: { 'K-9': 'xtext' },
      zones: [{ zone: '1', from: '10', to: '25' }], moves: [{ move: '2', kind: 'press', target: '15', speed: '10', acceleration: '2m/s²', forceLimit: '30', approach: '12' }],
    })
    expect(told()).toEqual([])
  })

  it('points at the cell that is wrong', () => {
    expect(treeOf(['K-001;;7;', 'K-003;;1.5;']).told()).toEqual(['enum /setup/positiveDirection 102', 'number-unclear /setup/softLimitMin 202'])
  })

  it('takes what is said beside the file where the file is silent', () => {
    expect(treeOf(['P-01;;S-1;'], { serial: 'S-2', model: 'LT10' }).plain).toEqual({ unit: { serial: 'S-1', model: 'LT10' } })
    expect(treeOf([], { serial: 'S-2' }).plain).toEqual({ unit: { serial: 'S-2' } })
  })

  it('asks for the tables that the list has', () => {
    const { tree, told } = treeOf(['Output;On from;On to'])
    tree.close(40)
    expect(told()).toEqual(['header /moves 40'])
  })

  it('names a column that is missing and what may be meant', () => {
    expect(treeOf(['Output;On form;On to', '1;2;3']).told()).toEqual(['header /zones 1'])
  })
})
