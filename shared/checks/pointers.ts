import type { Row } from '../motion/chains'
import type { MoveFieldName, ZoneFieldName } from '../settings/move-fields'
import type { SetupFieldName } from '../settings/types'

/** Pointer to a setup field in the canonical content. */
export function atSetup(name: SetupFieldName): string {
  return `/setup/${name}`
}

/** Pointer to a field of a move, or to the whole row. */
export function atMove(row: Row, field?: MoveFieldName): string {
  return field === undefined ? `/moves/${row.index}` : `/moves/${row.index}/${field}`
}

/** Pointer to a field of a zone by its index. */
export function atZone(index: number, field: ZoneFieldName): string {
  return `/zones/${index}/${field}`
}

/** Pointer to a key of `extra`, escaped as RFC 6901, section 3 asks: ~ as ~0, / as ~1. */
export function atExtra(key: string): string {
  return `/extra/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`
}
