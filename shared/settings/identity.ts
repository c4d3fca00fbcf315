/** Stands in a kit where the serial of the unit is still to be written; the reader takes it for missing. */
export const serialToBeWritten = 'TO-BE-WRITTEN'

/** What a serial is compared by: without case, as first written it is only shown. Serials are ASCII, so no language matters. */
export function serialKey(serial: string): string {
  return serial.toLowerCase()
}
