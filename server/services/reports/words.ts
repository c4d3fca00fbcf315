import { formatExact } from '#shared/units/exact-time'
import type { toldQueries } from '#server/database/report/queries'
import { spokenPlace } from '../change-words'
import type { EndPart, ToldChange } from './parts'

type Marked = ReturnType<ReturnType<typeof toldQueries>['markBefore']['get']>

/** `v7, approved by Runa Haldersen`; null where nothing was ever marked. */
export function knownGoodWords(found: Marked): string | null {
  if (found === undefined) return null
  return `${found.number === null ? 'none' : `v${found.number}`}, ${found.mark.meaning} by ${found.by}`
}

/** `30 Nov 2026 06:12:00 CET`: to the second, with the zone by its letters; its offset stands at the head of the report. */
export const timeText = (at: string, zone: string): string => formatExact(at, zone).replace(/^\S+ | \(.*\)$/g, '')

export const entryText = (entry: number | null): string => (entry === null ? '' : `log entry ${entry}`)
export const numberText = (entry: number | null): string => (entry === null ? '' : String(entry))

export const placeText = ({ section, row, field }: ToldChange): string => spokenPlace({ section, field, ...(row === null ? {} : { row }) })

/** `a work order, a reason`; without what is not there. */
export const joined = (...parts: readonly (string | null | undefined | false)[]): string => parts.filter(Boolean).join(', ')

const names: readonly (readonly [keyof EndPart['counts'], string, string])[] = [
  ['axis', 'axis', 'axes'], ['version', 'version', 'versions'], ['change', 'change', 'changes'], ['mark', 'known-good mark', 'known-good marks'], ['finding', 'finding', 'findings'],
  ['planned-change', 'planned change', 'planned changes'], ['waiver', 'waiver', 'waivers'], ['swap', 'swap', 'swaps'], ['signature', 'signature', 'signatures'],
]

/** `46 axes, 310 versions, 1 change …`: each kind, also where there is none. */
export const countWords = (counts: EndPart['counts']): string => names.map(([kind, one, many]) => `${counts[kind]} ${counts[kind] === 1 ? one : many}`).join(', ')
