import type { BoardAxis } from '#shared/api/board'
import type { Weight } from '#shared/settings/types'
import { worstWeight, type StripState } from '~/utils/strip-words'

export interface Stroke { readonly state: StripState, readonly weight?: Weight, readonly sense: 'more' | 'less' | null }

/** A machine with its axes, drawn as the worst of them. */
export interface MachineRow { readonly id: number, readonly name: string, readonly axes: readonly BoardAxis[], readonly worst: Stroke, readonly words: string }
export interface MachineGroup { readonly name: string, readonly machines: readonly MachineRow[], readonly inLine: boolean }
export interface LineRow { readonly site: string, readonly line: string, readonly axes: number, readonly machines: readonly MachineRow[], readonly groups: readonly MachineGroup[], readonly worst: Stroke, readonly words: string }

/** What one stroke stands for: to 60 axes an axis, to 2,500 a machine, beyond a line. */
export function strokeFor(axes: number): 'axis' | 'machine' | 'line' {
  if (axes <= 60) return 'axis'
  return axes <= 2500 ? 'machine' : 'line'
}

export function strokeOf(axis: BoardAxis): Stroke {
  return { state: axis.status, weight: axis.status === 'off' ? worstWeight(axis.off) : undefined, sense: axis.sense }
}

/** Harm first, then what is not known at all, then the lighter weights. */
const order = ['off-harm', 'never-read', 'unmarked', 'off-motion', 'off-text', 'off', 'in-line']
const rank = (stroke: Stroke) => order.indexOf(stroke.state === 'off' && stroke.weight ? `off-${stroke.weight}` : stroke.state)

function worstOf(axes: readonly BoardAxis[]): { worst: Stroke, words: string } {
  let worst: Stroke = { state: 'in-line', sense: null }
  let alike = 0
  for (const stroke of axes.map(strokeOf)) {
    if (rank(stroke) < rank(worst)) [worst, alike] = [stroke, 0]
    if (rank(stroke) === rank(worst)) alike += 1
  }
  return { worst, words: worst.state === 'in-line' ? 'in line' : `${alike} of ${axes.length} ${strokeWords(worst)}` }
}

function strokeWords(stroke: Stroke): string {
  if (stroke.state === 'off') return stroke.weight ? `off by ${stroke.weight}` : 'off'
  return stroke.state === 'never-read' ? 'no upload' : 'no known-good'
}

function gather<Item>(items: readonly Item[], keyOf: (item: Item) => string): Item[][] {
  const groups = new Map<string, Item[]>()
  for (const item of items) {
    const group = groups.get(keyOf(item))
    if (group) group.push(item)
    else groups.set(keyOf(item), [item])
  }
  return [...groups.values()]
}

export function machinesOf(axes: readonly BoardAxis[]): MachineRow[] {
  return gather(axes, axis => String(axis.machineId)).flatMap((own) => {
    const [first] = own
    return first ? [{ id: first.machineId, name: first.machine, axes: own, ...worstOf(own) }] : []
  })
}

/** 'LID' and '03' of LID-03; a name without a number at its end is all stem. */
export function splitName(name: string): { stem: string, number: string } {
  const cut = /^(.*?)[-_. ]?(\d+)$/.exec(name)
  return cut?.[1] ? { stem: cut[1], number: cut[2] ?? '' } : { stem: name, number: '' }
}

function groupsOf(machines: readonly MachineRow[]): MachineGroup[] {
  return gather(machines, machine => splitName(machine.name).stem).map((own) => {
    const numbers = own.map(machine => splitName(machine.name).number).filter(Boolean)
    const stem = splitName(own[0]?.name ?? '').stem
    const span = numbers.length > 1 ? `${numbers[0]}–${numbers[numbers.length - 1]}` : numbers[0] ?? ''
    return { name: [stem, span].filter(Boolean).join(' '), machines: own, inLine: own.every(machine => machine.worst.state === 'in-line') }
  })
}

/** The plant by line, in the order in which the axes come. */
export function linesOf(axes: readonly BoardAxis[]): LineRow[] {
  return gather(axes, axis => `${axis.site}\n${axis.line}`).flatMap((own) => {
    const [first] = own
    if (!first) return []
    const machines = machinesOf(own)
    return [{ site: first.site, line: first.line, axes: own.length, machines, groups: groupsOf(machines), ...worstOf(own) }]
  })
}
