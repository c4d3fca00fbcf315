import type { JudgingContext } from '#shared/api/uploads'
import type { WaiverRecord } from '#shared/api/waivers'
import type { CheckResult } from '#shared/checks/types'
import type { FieldChange, Renumbering } from '#shared/diff/types'
import type { FormatError, ReadSettings } from '#shared/settings/types'
import type { Layout } from './layout'

export interface Axis { readonly id: number, readonly tag: string, readonly role: string }

/** A file whose axis is known, read against what that axis holds. */
export interface Placed {
  readonly state: 'placed'
  readonly read: ReadSettings
  readonly axis: Axis
  /** The number it would get as a version. */
  readonly number: number
  /** What it was compared with; null = the first of its axis. */
  readonly base: { readonly number: number, readonly versionId: number | null, readonly name: string | null } | null
  readonly knownGood: JudgingContext['knownGood']
  readonly sameAsKnownGood: boolean
  readonly sightings: number
  /** Captured before what is current: it gets a number and does not become current. */
  readonly late: boolean
  readonly clockAhead: boolean
  readonly identical: boolean
  readonly changes: readonly FieldChange[]
  readonly renumbered: readonly Renumbering[]
  /** What stands; what somebody accepted is apart. */
  readonly checks: readonly CheckResult[]
  readonly accepted: readonly { readonly result: CheckResult, readonly waiver: WaiverRecord }[]
}

export type Reading
  = | { readonly state: 'waits' }
    | { readonly state: 'unreadable', readonly errors: readonly FormatError[], readonly more: number, /** Saying which sign is the decimal one would help. */ readonly asksSign?: boolean, /** It may be a drive's own list. */ readonly asksLayout?: boolean }
    | { readonly state: 'unplaced', readonly read: ReadSettings, readonly problem: 'serial-unknown' | 'not-fitted' | 'axis-kind', readonly tag: string | null }
    | { readonly state: 'unjudged', readonly read: ReadSettings, readonly why: string }
    | { readonly state: 'twin', readonly of: string }
    | Placed

export interface ListedFile {
  readonly id: number
  readonly name: string
  readonly bytes: Uint8Array
  /** Answer to number-unclear; absent = as the file tells. */
  readonly decimal?: 'point' | 'comma'
  /** The file is a drive's own list; absent = the neutral form. */
  readonly layout?: Layout
  readonly reading: Reading
}

/** How a change weighs on the page: a stop check or a watched change wants words. */
export const watchedChanges = (reading: Placed): readonly FieldChange[] => reading.changes.filter(change => change.watched)
export const stops = (reading: Placed): readonly CheckResult[] => reading.checks.filter(check => check.level === 'stop')

/** Version 1 is exempt: there is nothing that it changes. */
export const wantsReason = (reading: Reading): reading is Placed => reading.state === 'placed' && reading.base !== null && watchedChanges(reading).length > 0
export const hasStop = (reading: Reading): reading is Placed => reading.state === 'placed' && !reading.identical && stops(reading).length > 0
export const hasAccepted = (reading: Reading): reading is Placed => reading.state === 'placed' && !reading.identical && reading.accepted.length > 0
