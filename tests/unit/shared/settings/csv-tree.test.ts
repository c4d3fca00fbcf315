import { describe, expect, it } from 'vitest'
import { CsvTree, type Entry } from '../../../../shared/settings/csv-tree'
import { Problems } from '../../../../shared/settings/problems'
import type { RawNode } from '../../../../shared/settings/raw'

const plain = (node: RawNode): unknown => {
  if (node.kind === 'object') return Object.fromEntries(node.keys.map((key, index) => [key, plain(node.values[index] as RawNode)]))
  if (node.kind === 'list') return node.items.map(plain)
  return node.kind === 'cell' ? node.text + node.unit : node.kind
}

function treeOf(...lines: string[]) {
  const problems = new Problems({ place: ({ offset, cell }) => ({ line: offset, column: (cell ?? -1) + 1 }), shown: () => 'cell' })
  const tree = new CsvTree(problems, 1)
  const made: (Entry & { at: string })[] = []
  lines.forEach((line, index) => tree.add({ cells: line.split(','), offset: index + 2 }, (entry, spot, at) => {
    made.push({ ...entry, at })
    return { kind: 'cell', ...spot, text: entry.value, unit: entry.unit }
  }))
  return { tree: plain(tree.root), made, told: problems.outcome().errors.map(error => `${error.code} ${error.at} ${error.line}:${error.column}`) }
}

describe('CsvTree', () => {
  it('is the tree of the JSON form', () => {
    const { tree, told } = treeOf('file,,axisKind,linear,', 'unit,,serial,A1,', 'setup,,jogSpeed,50,mm/s', 'zone,3,from,1,mm', 'zone,3,to,2,mm', 'move,7,kind,absolute,', 'extra,,K,1,', 'reading,,h,2,')
    expect(tree).toEqual({
      axisKind: 'linear', unit: { serial: 'A1' }, setup: { jogSpeed: '50mm/s' }, zones: [{ zone: '3', from: '1mm', to: '2mm' }], moves: [{ move: '7', kind: 'absolute' }], extra: { K: '1' }, readings: { h: '2' },
    })
    expect(told).toEqual([])
  })

  it('has rows by their first line, wherever the others stand', () => {
    const { tree, made } = treeOf('move,7,kind,absolute,', 'move,2,kind,relative,', 'setup,,jerk,1,', 'move,7,target,1,', 'move,2,target,2,')
    expect(tree).toMatchObject({ moves: [{ move: '7', kind: 'absolute', target: '1' }, { move: '2', kind: 'relative', target: '2' }] })
    expect(made.map(entry => entry.at)).toEqual(['/moves/0/kind', '/moves/1/kind', '/setup/jerk', '/moves/0/target', '/moves/1/target'])
  })

  it('takes row numbers as they are written: 1 and 01 are two rows', () => {
    expect(treeOf('move,1,kind,a,', 'move,01,kind,b,').tree).toMatchObject({ moves: [{ move: '1' }, { move: '01' }] })
  })

  it.each([
    ['zones,1,from,1,mm', 'key-unknown /zones 2:1'], [',,,x,', 'key-unknown / 2:1'], ['Setup,,jerk,1,', 'key-unknown /Setup 2:1'], ['constructor,,a,1,', 'key-unknown /constructor 2:1'],
    ['file,,setup,1,', 'key-unknown /setup 2:3'], ['file,,unit,A1,', 'key-unknown /unit 2:3'], ['move,1,move,2,', 'key-unknown /moves/0/move 2:3'], ['zone,1,zone,2,', 'key-unknown /zones/0/zone 2:3'],
    ['setup,1,jerk,1,', 'row-number /setup/jerk 2:2'], ['extra,0,K,1,', 'row-number /extra/K 2:2'], ['file,1,note,x,', 'row-number /note 2:2'],
  ])('refuses %s', (line, problem) => expect(treeOf(line).told).toEqual([problem]))

  it('refuses a value given twice, at its second line', () => {
    expect(treeOf('setup,,jerk,1,', 'setup,,jerk,1,').told).toEqual(['value-duplicate /setup/jerk 3:4'])
    expect(treeOf('move,1,kind,a,', 'move,2,kind,a,', 'move,1,kind,b,').told).toEqual(['value-duplicate /moves/0/kind 4:4'])
    expect(treeOf('file,,note,a,', 'file,,note,b,').told).toEqual(['value-duplicate /note 3:4'])
    expect(treeOf('extra,,K,1,', 'reading,,K,1,').told).toEqual([])
  })

  it('escapes keys in pointers', () => expect(treeOf('extra,,a/b~c,1,').made[0]?.at).toBe('/extra/a~1b~0c'))
})
