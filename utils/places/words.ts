import type { Axis } from '#shared/api/versions'
import { unitStates, type Unit } from '#shared/api/places'
import type { Option } from '../forms/fields'

export const stateWords: Readonly<Record<Unit['state'], string>> = { spare: 'spare, ready to fit', fitted: 'fitted', failed: 'failed', repair: 'away for repair', scrapped: 'scrapped' }
export const stateOptions: Option[] = unitStates.map(state => ({ value: state, label: stateWords[state] }))
/** What a unit can be once it is taken out. */
export const outStates: Option[] = stateOptions.filter(option => option.value !== 'fitted')

/** How often an upload is due: whole days as days. */
export function intervalInWords(hours: number | null): string {
  if (hours === null) return 'never due'
  if (hours % 24 !== 0) return `every ${hours} h`
  return hours === 24 ? 'every day' : hours === 168 ? 'every week' : `every ${hours / 24} d`
}

export const dutyInWords = (duty: Axis['duty']): string => duty ? `${duty.moves.join(' ')} in ${duty.cycleTime} ms` : 'not said'

export const serialOf = (unit: { readonly serial: string, readonly channel: number | null }): string => unit.channel ? `${unit.serial} channel ${unit.channel}` : unit.serial
