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

describe('rows of a drive’s list', () => {
  const table = (...rows: string[]) => treeOf(['Output;On from;On to', ...rows])

  it('are one row where their numbers are one, padded or not', () => {
    const { plain: tree, told } = table('1;10;25', '01;30;40', '+1;50;60')
    expect(tree).toEqual({ zones: [{ zone: '1', from: '10', to: '25' }] })
    expect(told()).toEqual(['row-duplicate /zones 300', 'row-duplicate /zones 400'])
  })

  it('end early where the rest is not set, and may go on beyond the last column', () => {
    expect(table('1;10', '2;10;25;left over').plain).toEqual({ zones: [{ zone: '1', from: '10' }, { zone: '2', from: '10', to: '25' }] })
  })

  it('of one number in two tables are two rows', () => {
    expect(treeOf(['Output;On from;On to', '1;10;25', 'Step;Mode;Pos;Vel;Acc;Name;Force;Slow at;Then', '1;A;500;10;2;;-;-;-']).told()).toEqual([])
  })

  it('go on where their table begins a second time, with its columns in the order of the second', () => {
    expect(treeOf(['Output;On from;On to', '1;10;25', 'Output;On to;On from', '2;60;50']).plain).toEqual({ zones: [{ zone: '1', from: '10', to: '25' }, { zone: '2', to: '60', from: '50' }] })
  })

  it('are not read where the column of their number is missing: nothing could say which they are', () => {
    const { plain: tree, told } = treeOf(['Step;Mode;Pos', '1;A;500'])
    expect(tree).toEqual({ moves: [{ move: '1', kind: 'absolute', target: '5' }] })
    expect(told().every(line => line.startsWith('header /moves'))).toBe(true)
    expect(told()).toHaveLength(6)
  })
})

describe('parameters of a drive’s list', () => {
  it('are known by their number, guarded or with blanks around it', () => {
    expect(treeOf([' K-003 ;;1,5;mm']).plain).toEqual({ setup: { softLimitMin: '1.5' } })
    expect(treeOf(['\'=5;;1;A']).plain).toEqual({ extra: { '=5': '1A' } })
  })

  it('are told where their line has no number', () => {
    expect(treeOf([';;1,5;mm', 'K-003;;2;mm']).told()).toEqual(['csv-syntax  1'])
  })

  it('that nobody set are not there, whatever the list has for it', () => {
    expect(treeOf(['K-003;;;mm', 'K-050;;  ;counts', 'K-999;;;']).plain).toEqual({})
  })

  it('behind the tables are rows of the last one, as a drive writes its list in one order', () => {
    expect(treeOf(['Output;On from;On to', 'K-003;;2;mm']).plain).toEqual({ zones: [{ zone: 'K-003', to: '2' }] })
  })
})
