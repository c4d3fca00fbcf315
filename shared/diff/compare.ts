import type { SetupFieldName } from '../settings/fields'
import type { Nameplate } from '../settings/nameplate'
import type { Content, ExtraValue } from '../settings/types'
import { Exact } from '../units/exact'
import { effectiveInMove, effectiveInSetup } from './defaults'
import { diffContents } from './diff'
import { toleranceOf } from './tolerance'
import type { Comparison, DiffContext, FieldChange } from './types'

export interface CompareOptions {
  /** Of the unit that was read back, with its entry table; without it every value is compared exactly. */
  readonly nameplate?: Nameplate
  /** Both contents were read from one unit: then homeOffset is compared like the rest. */
  readonly sameUnit: boolean
  /** Setup values to be taught on this swap. */
  readonly taught?: readonly SetupFieldName[]
  /** Keys of extra to be taught on this swap. */
  readonly taughtExtra?: readonly string[]
  readonly context?: DiffContext
}

/**
 * identical: not one change. same: every change is within the read-back tolerance or set aside. differs: the rest. Rows
 * are paired by number. A default written out counts as the value it stands for.
 */
export function compareContents(a: Content, b: Content, options: CompareOptions): Comparison {
  const aside: FieldChange[] = []
  const within: Comparison['within'][number][] = []
  const differences: Comparison['differences'][number][] = []
  const changes = diffContents(a, b, options.context)
  for (const change of changes) {
    const tolerance = toleranceOf(change, options.nameplate ?? {})
    if (isSetAside(change, options)) aside.push(change)
    else if (isWithin(change, tolerance, a, b)) within.push({ ...change, tolerance: tolerance.toNumber() })
    else differences.push(tolerance.isZero() ? change : { ...change, tolerance: tolerance.toNumber() })
  }
  const verdict = changes.length === 0 ? 'identical' : differences.length === 0 ? 'same' : 'differs'
  return { verdict, differences, within, aside }
}

function isSetAside({ section, field }: FieldChange, { sameUnit, taught = [], taughtExtra = [] }: CompareOptions): boolean {
  if (section === 'extra') return taughtExtra.includes(field)
  if (section !== 'setup') return false
  return (field === 'homeOffset' && !sameUnit) || taught.some(name => name === field)
}

function isWithin(change: FieldChange, tolerance: Exact, a: Content, b: Content): boolean {
  const before = change.before ?? standIn(change, a)
  const after = change.after ?? standIn(change, b)
  if (change.section === 'extra' || before === undefined || after === undefined) return false
  if (typeof before === 'number' && typeof after === 'number') return new Exact(after).minus(before).abs().lte(tolerance)
  return before === after
}

/** What stands for a value that a content leaves out; nothing stands for a row that it lacks. */
function standIn({ section, field, row }: FieldChange, content: Content): ExtraValue | undefined {
  if (section === 'setup') return effectiveInSetup(field, content.setup)
  const move = section === 'move' ? content.moves.find(candidate => candidate.move === row) : undefined
  return move && effectiveInMove(field, move, content.setup)
}
