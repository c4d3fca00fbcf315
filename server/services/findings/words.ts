import { partsOfTime, shortMonth, zoneWord } from '#shared/units/exact-time'
import type { FieldChange } from '#shared/diff/types'
import { spokenPlace, valueWords } from '../change-words'

/** `9 Mar 2026 14:32`: what a title has room for; the exact time stands beside it. */
function minuteOf(iso: string, zone: string): string {
  const { day, month, year, hour, minute } = partsOfTime(new Date(iso), zone)
  return `${day} ${shortMonth(month)} ${year} ${hour}:${minute}`
}

export interface Between { readonly before: { readonly number: number, readonly at: string }, readonly after: { readonly number: number, readonly at: string }, readonly zone: string }

/** A change as a line of a letter: `thrust limit 38 → 55 %`. */
export const changeLine = (change: FieldChange): string => `${spokenPlace(change)} ${valueWords(change)}`

/** `LID-02.Z thrust limit 38 → 55 %, changed between 3 Mar 2026 06:10 (v7) and 9 Mar 2026 14:32 CET (v8)`; the weightiest by name. */
export function changeTitle(tag: string, changes: readonly FieldChange[], { before, after, zone }: Between): string {
  const [first] = changes
  const more = changes.length > 1 ? ` and ${changes.length - 1} more` : ''
  return `${tag} ${first ? changeLine(first) : 'moves'}${more}, changed between ${minuteOf(before.at, zone)} (v${before.number}) and ${minuteOf(after.at, zone)} ${zoneWord(new Date(after.at), zone)} (v${after.number})`
}
