import type { UnitIdentity } from './types'

/** Stands in a kit where the serial of the unit is still to be written; the reader takes it for missing. */
export const serialToBeWritten = 'TO-BE-WRITTEN'

/** What a serial is compared by: without case, as first written it is only shown. Serials are ASCII, so no language matters. */
export function serialKey(serial: string): string {
  return serial.toLowerCase()
}

/** True where two files are of the same unit, or of the same axis of a drive with several: serial without case, and channel. */
export function isSameUnit(one: UnitIdentity, other: UnitIdentity): boolean {
  return serialKey(one.serial) === serialKey(other.serial) && one.channel === other.channel
}
