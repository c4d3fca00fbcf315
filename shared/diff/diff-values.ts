import { setupFieldNames } from '../settings/fields'
import { zoneFieldNames } from '../settings/move-fields'
import { step } from '../settings/reading'
import type { Content, ExtraValue, Move, Setup, Zone } from '../settings/types'
import { changeOf } from './change'
import { goByPressSpeed, sameMotionInSetup } from './defaults'
import { sameValue } from './measure'
import { rowChange } from './row-change'
import { extraRule } from './rules'
import type { Sides } from './sides'
import type { FieldChange } from './types'
import { walkByNumber } from './walk'

/** Adds the change of the axis kind, if any. */
export function pushFileChanges(out: FieldChange[], { before, after, is }: Sides): void {
  if (before.axisKind === after.axisKind) return
  out.push(changeOf(is.axisKind, { at: '/axisKind', section: 'file', row: undefined }, before.axisKind, after.axisKind, false))
}

/**
 * Adds the changes of setup values in the order of the table. `partners` are the moves that stand on both sides: a changed
 * press speed names those, by their number in the second content, that go by it.
 */
export function pushSetupChanges(out: FieldChange[], sides: Sides, partners: () => Iterable<readonly [Move, Move]>): void {
  const before = sides.before.setup
  const after = sides.after.setup
  if (sameSetup(before, after)) return
  for (const name of setupFieldNames) {
    const was = before[name]
    const is = after[name]
    if (was === is) continue
    const sameMotion = (was === undefined || is === undefined) && sameMotionInSetup(name, before, after)
    const rule = (is === undefined ? sides.was : sides.is).setup(name)
    const change = changeOf(rule, { at: `/setup/${name}`, section: 'setup', row: undefined }, was, is, sameMotion)
    const affects = name === 'pressSpeed' ? movesByPressSpeed(partners()) : []
    out.push(affects.length > 0 ? { ...change, affects } : change)
  }
}

/** Equality of setups, whose keys a reader puts into one order; the quick way out where nothing changed. */
function sameSetup(a: Setup, b: Setup): boolean {
  const keys = Object.keys(b)
  const values: ExtraValue[] = Object.values(b)
  let index = 0
  // Read by for…in, since keyed reads of forty fields by name cost three times as much.
  for (const key in a) {
    if (key !== keys[index] || (a as Content['extra'])[key] !== values[index]) return false
    index += 1
  }
  return index === keys.length
}

/** Equality of the drive's own values, in whatever order a file has them; the quick way out where nothing changed. */
function sameExtra(a: Content['extra'], b: Content['extra']): boolean {
  let count = 0
  for (const key in a) {
    if (!Object.hasOwn(b, key) || !sameValue(a[key], b[key])) return false
    count += 1
  }
  return count === Object.keys(b).length
}

function movesByPressSpeed(partners: Iterable<readonly [Move, Move]>): number[] {
  return [...partners].filter(([was, is]) => goByPressSpeed(was, is)).map(([, is]) => is.move).sort((a, b) => a - b)
}

/** Adds the changes of all zones, paired by number. */
export function pushZoneChanges(out: FieldChange[], sides: Sides): void {
  walkByNumber<Zone>(sides.before.zones, sides.after.zones, zone => zone.zone, (before, i, after, j) => {
    for (const field of zoneFieldNames) {
      const was = before?.[field]
      const is = after?.[field]
      if (was === is) continue
      const at = is === undefined ? `/zones/${i}/${field}` : `/zones/${j}/${field}`
      const rule = (is === undefined ? sides.was : sides.is).zone[field]
      out.push(rowChange(rule, at, 'zone', (after ?? before as Zone).zone, was, is, false))
    }
  })
}

/** Adds the changes of the drive's own values, keys by code unit. */
export function pushExtraChanges(out: FieldChange[], { before, after, context }: Sides): void {
  if (sameExtra(before.extra, after.extra)) return
  const keys = Object.keys(after.extra).filter(key => !Object.hasOwn(before.extra, key) || !sameValue(before.extra[key], after.extra[key]))
  for (const key of Object.keys(before.extra)) if (!Object.hasOwn(after.extra, key)) keys.push(key)
  for (const key of keys.sort()) {
    const from = Object.hasOwn(before.extra, key) ? before.extra[key] : undefined
    const to = Object.hasOwn(after.extra, key) ? after.extra[key] : undefined
    const place = { at: `/extra${step(key)}`, section: 'extra', row: undefined } as const
    out.push(changeOf(extraRule(key, context), place, from, to, false))
  }
}
