import type { Occasion } from '#shared/api/versions'
import { counted } from '../format'
import type { ListedFile, Placed, Reading } from './model'

/** A routine file that holds what is current already is a sighting; on any other occasion it is a version of its own. */
export const isSighting = (reading: Placed, occasion: Occasion): boolean => reading.identical && occasion === 'routine'

function placedBecomes(reading: Placed, occasion: Occasion): string {
  if (isSighting(reading, occasion)) return `a sighting of v${reading.base?.number ?? reading.number}: identical`
  const also = [
    reading.base === null ? 'the first of this axis' : '',
    reading.identical ? 'nothing changed' : '',
    reading.late ? `late: older than v${reading.base?.number ?? ''}, does not become current` : '',
    reading.clockAhead ? 'its clock runs ahead, the time of receipt counts' : '',
    reading.knownGood === null ? 'no known-good yet' : reading.sameAsKnownGood ? `same as known-good v${reading.knownGood.number}` : '',
  ].filter(text => text !== '')
  return [`v${reading.number}`, ...also].join(', ')
}

/** What the vault will make of the file, as far as this browser can tell before it is sent. */
export function becomes(reading: Reading, occasion: Occasion): string {
  switch (reading.state) {
    case 'placed': return placedBecomes(reading, occasion)
    case 'unreadable': return 'into the tray, as it came'
    case 'unplaced': return 'into the tray'
    case 'unjudged': return 'the vault decides'
    case 'twin': return `not sent: the same bytes as ${reading.of}`
    case 'waits': return 'being read'
  }
}

export interface Forecast { readonly versions: number, readonly seen: number, readonly tray: number, readonly open: number, readonly twins: number, readonly waits: number }

export function forecast(files: readonly ListedFile[], occasion: Occasion): Forecast {
  const count = { versions: 0, seen: 0, tray: 0, open: 0, twins: 0, waits: 0 }
  for (const { reading } of files) {
    if (reading.state === 'placed') count[isSighting(reading, occasion) ? 'seen' : 'versions'] += 1
    else if (reading.state === 'unjudged') count.open += 1
    else if (reading.state === 'twin') count.twins += 1
    else if (reading.state === 'waits') count.waits += 1
    else count.tray += 1
  }
  return count
}

/** “9 files read. 6 new versions, 1 seen again, 2 for the tray”. */
export function headline(files: readonly ListedFile[], occasion: Occasion): string {
  const { versions, seen, tray, open, twins, waits } = forecast(files, occasion)
  if (waits > 0) return `Reading ${counted(files.length, 'file', 'files')}. ${files.length - waits} read`
  const parts = [
    versions > 0 ? counted(versions, 'new version', 'new versions') : '',
    seen > 0 ? `${seen} seen again` : '',
    tray > 0 ? `${tray} for the tray` : '',
    open > 0 ? `${open} for the vault to judge` : '',
    twins > 0 ? `${twins} twice in the list` : '',
  ].filter(text => text !== '')
  return `${counted(files.length, 'file', 'files')} read. ${parts.join(', ')}`
}
