import type { FieldChange } from '#shared/diff/types'
import { forceBaseOf } from '#shared/motion/force-base'
import type { AxisKind, ExtraValue } from '#shared/settings/types'
import { isForcePercent, newtons } from '#shared/sheet/beside'
import { nameplateRows } from '#server/database/nameplate/queries'
import type { VaultDb } from '#server/database/prepared'

/** Which model a percentage was read from, and when: its nameplate as it was then says what 100 % is. */
export interface ReadFrom { readonly model: string, readonly at: string }
/** Both sides of a changed percentage in newtons (rotary: N·m), with the unit; null where there is none, or nobody knows. */
export interface Newtons { readonly before: string | null, readonly after: string | null }

export interface ReadBoth { readonly axisKind: AxisKind, readonly before: ReadFrom | null, readonly after: ReadFrom }
interface Sides extends Pick<FieldChange, 'section' | 'field'> { readonly before: ExtraValue | null, readonly after: ExtraValue | null }

/** The force that a change of a percentage means; null where it is no force, or no nameplate tells what 100 % is. `read` is asked only where it is a force. */
export function newtonsOf(db: VaultDb, { section, field, before, after }: Sides, read: () => ReadBoth): Newtons | null {
  if ((section !== 'setup' && section !== 'move') || !isForcePercent(field)) return null
  const from = read()
  const side = (value: ExtraValue | null, at: ReadFrom | null) => {
    const base = typeof value === 'number' && at !== null ? forceBaseOf(nameplateRows(db).at.get({ ...at })?.nameplate) : undefined
    return typeof value === 'number' && base !== undefined ? newtons(value, base, from.axisKind) : null
  }
  const told = { before: side(before, from.before), after: side(after, from.after) }
  return told.before === null && told.after === null ? null : told
}
