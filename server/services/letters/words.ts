import type { LetterKindOf } from '#shared/api/letters'
import { formatExact } from '#shared/units/exact-time'

/** What the caller knows; the words are made here. Instants are RFC 3339 UTC, people are named as they are read. */
export interface AxisFacts {
  'swap-unreleased': { readonly swapId: number, readonly runningSince: string, readonly releaseHours: number, readonly by: string }
  'swap-released': { readonly swapId: number, readonly at: string, readonly by: string, readonly unitOut: string, readonly unitIn: string, readonly knownGood: number | null }
  'unfit-gone-on': { readonly swapId: number, readonly unitIn: string, readonly why: readonly string[], readonly at: string, readonly allowedBy: string, readonly reason: string }
  'watched-change': { readonly versionId: number, readonly number: number, readonly capturedAt: string, readonly changes: readonly string[], readonly storedBy: string, readonly finding: { readonly id: number, readonly explained: boolean } }
  'finding-opened': { readonly findingId: number, readonly title: string, readonly at: string, readonly dueAt: string }
  'finding-overdue': { readonly findingId: number, readonly title: string, readonly dueAt: string }
}
export interface VaultFacts {
  'checkpoint': { readonly date: string, readonly note: string }
  'verification-failed': { readonly at: string, readonly says: string }
  'copy-failed': { readonly at: string, readonly to: string, readonly says: string }
}

/** A letter's own words. `cause`: what makes it another letter than one of the same kind. A paragraph with line ends stays as it is. */
export interface Words { readonly cause: string, readonly title: string, readonly paragraphs: readonly string[], readonly path: string }
export interface Spot { readonly tag: string, readonly machine: string, readonly line: string, readonly zone: string }

type Writer<Facts> = (facts: Facts, spot: Spot) => Words
const where = ({ machine, line }: Spot) => `${machine}, ${line}`
const swap = (id: number) => `/swaps/${id}`
const finding = (id: number) => `/findings/${id}`
/** More would be read on the page anyway. */
const mostNamed = 20
const listed = (lines: readonly string[]) => [...lines.slice(0, mostNamed), ...(lines.length > mostNamed ? [`and ${lines.length - mostNamed} more`] : [])].map(line => `- ${line}`).join('\n')

export const axisWords: { readonly [Kind in LetterKindOf<'watchers'>]: Writer<AxisFacts[Kind]> } = {
  'swap-unreleased': ({ swapId, runningSince, releaseHours, by }, spot) => ({
    cause: `swap:${swapId}`, path: swap(swapId), title: `${spot.tag} runs unreleased for more than ${releaseHours} h`,
    paragraphs: [`The swapped unit at ${spot.tag} (${where(spot)}) runs since ${formatExact(runningSince, spot.zone)} and is not released. The site allows ${releaseHours} h.`, `Set running by ${by}. A planner looks at the read-back and releases it.`],
  }),
  'swap-released': ({ swapId, at, by, unitOut, unitIn, knownGood }, spot) => ({
    cause: `swap:${swapId}`, path: swap(swapId), title: `${spot.tag}: swap released`,
    paragraphs: [`${by} released the swap at ${spot.tag} (${where(spot)}) on ${formatExact(at, spot.zone)}.`, `Unit out ${unitOut}, unit in ${unitIn}. ${knownGood === null ? 'No version is known-good.' : `Known-good is v${knownGood}.`}`],
  }),
  'unfit-gone-on': ({ swapId, unitIn, why, at, allowedBy, reason }, spot) => ({
    cause: `swap:${swapId}:${unitIn}`, path: swap(swapId), title: `${spot.tag}: swap goes on with a unit that does not fit`,
    paragraphs: [`The swap at ${spot.tag} (${where(spot)}) goes on with unit ${unitIn} since ${formatExact(at, spot.zone)}, which does not fit:`, listed(why), `Allowed by ${allowedBy}: ${reason}`],
  }),
  'watched-change': ({ versionId, number, capturedAt, changes, storedBy, finding: { id, explained } }, spot) => ({
    cause: `version:${versionId}`, path: finding(id), title: `${spot.tag}: ${changes[0] ?? 'watched value changed'}${changes.length > 1 ? `, and ${changes.length - 1} more` : ''}`,
    paragraphs: [`Watched values of ${spot.tag} (${where(spot)}) changed. Version ${number}, captured ${formatExact(capturedAt, spot.zone)}, uploaded by ${storedBy}:`, listed(changes), explained ? 'The change is explained; someone else closes it.' : 'Nobody has said why. Whoever knows, explains it.'],
  }),
  'finding-opened': ({ findingId, title, at, dueAt }, spot) => ({
    cause: `finding:${findingId}:${at}`, path: finding(findingId), title: `Finding: ${title}`,
    paragraphs: [`${title}.`, `Opened ${formatExact(at, spot.zone)} at ${spot.tag} (${where(spot)}). It is to be explained and closed by ${formatExact(dueAt, spot.zone)}.`],
  }),
  'finding-overdue': ({ findingId, title, dueAt }, spot) => ({
    cause: `finding:${findingId}:${dueAt}`, path: finding(findingId), title: `Overdue finding: ${title}`,
    paragraphs: [`${title}.`, `It was to be closed by ${formatExact(dueAt, spot.zone)} and is not. ${spot.tag} (${where(spot)}).`],
  }),
}

export const vaultWords: { readonly [Kind in LetterKindOf<'vault'>]: (facts: VaultFacts[Kind], zone: string) => Words } = {
  'checkpoint': ({ date, note }) => ({
    cause: date, path: '/trail', title: `Checkpoint of the trail, ${date}`,
    paragraphs: ['Keep this letter where the vault cannot reach it. It proves what the log held when it was signed; the page of the trail checks it.', note],
  }),
  'verification-failed': ({ at, says }, zone) => ({
    cause: at, path: '/trail', title: 'The verification of the trail failed',
    paragraphs: [`The vault verified itself on ${formatExact(at, zone)} and found damage:`, says, 'Stop writing to it, keep the data folder as it is, and compare with an off-site copy.'],
  }),
  'copy-failed': ({ at, to, says }, zone) => ({
    cause: `${at} ${to}`, path: '/admin', title: 'An off-site copy failed',
    paragraphs: [`The copy to ${to} failed on ${formatExact(at, zone)}:`, says],
  }),
}

export interface OverdueAxis { readonly tag: string, readonly machine: string, readonly line: string, readonly dueAt: string, readonly zone: string }

/** The daily list; `date` is the day at the reader's place. */
export function digestWords(date: string, axes: readonly OverdueAxis[]): Words {
  const count = axes.length === 1 ? '1 upload is overdue' : `${axes.length} uploads are overdue`
  return {
    cause: date, path: '/', title: `${count}, ${date}`,
    paragraphs: [`${count}. An axis that was not read cannot be restored to what it holds today.`, axes.map(({ tag, machine, line, dueAt, zone }) => `- ${tag} (${machine}, ${line}): due since ${formatExact(dueAt, zone)}`).join('\n')],
  }
}
