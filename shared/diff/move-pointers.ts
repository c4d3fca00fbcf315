import { moveFieldNames } from '../settings/move-fields'

const known: (readonly string[])[] = []

/** JSON Pointers to the fields of the move at this index, in the order of moveFieldNames. Kept, since joining texts costs more than the rest of a change. */
export function movePointers(index: number): readonly string[] {
  return known[index] ??= moveFieldNames.map(field => `/moves/${index}/${field}`)
}
