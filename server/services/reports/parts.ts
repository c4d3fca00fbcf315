import type { FindingCause, FindingState } from '#shared/api/findings'
import type { FieldChange } from '#shared/diff/types'
import type { ExtraValue, Weight } from '#shared/settings/types'
import type { Newtons } from '../forces/newtons'

/*
 * What an audit report tells, part by part in its order: what the JSON form holds as it stands, and the paper in words. `entry` is
 * the number of the log entry that says the same; its proof is reckoned on the trail page.
 */

export interface ToldChange extends Pick<FieldChange, 'section' | 'field'> {
  readonly row: number | null
  readonly before: ExtraValue | null
  readonly after: ExtraValue | null
  readonly unit: string | null
  readonly newtons: Newtons | null
  readonly weight: Weight
  readonly watched: boolean
}

export interface AxisPart {
  readonly kind: 'axis'
  readonly axisId: number
  readonly tag: string
  readonly place: string
  readonly timeZone: string
  /** Units that sat there in the period. */
  readonly units: readonly { readonly serial: string, readonly model: string, readonly from: string, readonly to: string | null }[]
  /** What was known-good when the period began, and when it ended. */
  readonly knownGood: { readonly before: string | null, readonly after: string | null }
  /** Uploads that found the settings unchanged. */
  readonly seen: { readonly count: number, readonly lastAt: string | null }
}

export interface VersionPart {
  readonly kind: 'version'
  readonly versionId: number
  readonly tag: string
  readonly timeZone: string
  readonly number: number
  readonly occasion: string
  readonly capturedAt: string
  readonly receivedAt: string
  readonly clockDoubtful: boolean
  readonly late: boolean
  readonly serial: string
  readonly model: string
  readonly scribeCode: string
  readonly storedBy: string
  readonly changedBy: string | null
  readonly allowedBy: string | null
  readonly reason: string | null
  readonly workOrder: string | null
  readonly void: { readonly at: string, readonly by: string, readonly reason: string } | null
  readonly base: { readonly number: number, readonly at: string } | null
  readonly findingId: number | null
  readonly entry: number | null
  readonly changes: readonly ToldChange[]
}

export interface MarkPart { readonly kind: 'mark', readonly tag: string, readonly timeZone: string, readonly number: number | null, readonly at: string, readonly by: string, readonly meaning: string, readonly note: string | null, readonly entry: number | null }

export interface ToldAct {
  readonly kind: string
  readonly at: string
  readonly by: string
  readonly text: string | null
  readonly madeBy: string | null
  readonly madeAt: string | null
  readonly workOrder: string | null
  readonly plannedChangeId: number | null
  readonly as: string | null
  readonly allowedBy: string | null
  /** `LID-02.Z v9`. */
  readonly version: string | null
  readonly entry: number | null
}

export interface FindingPart {
  readonly kind: 'finding'
  readonly findingId: number
  readonly title: string
  readonly cause: FindingCause
  readonly weight: Weight
  readonly timeZone: string
  readonly openedAt: string
  /** As it stood when the report was asked for. */
  readonly state: FindingState
  readonly shown: readonly { readonly tag: string, readonly number: number | null, readonly at: string, readonly says: string }[]
  readonly acts: readonly ToldAct[]
}

export interface PlanPart {
  readonly kind: 'planned-change'
  readonly plannedChangeId: number
  readonly tags: readonly string[]
  /** Each field with its range, in words. */
  readonly fields: readonly string[]
  readonly timeZone: string
  readonly from: string
  readonly until: string
  readonly reason: string
  readonly allowedBy: string
  readonly announcedAt: string
  readonly announcedBy: string
  readonly ended: { readonly at: string, readonly by: string, readonly reason: string } | null
  readonly explained: readonly number[]
  readonly entry: number | null
}

export interface WaiverPart {
  readonly kind: 'waiver'
  readonly waiverId: number
  readonly tag: string
  readonly timeZone: string
  readonly rule: string
  readonly at: readonly string[]
  readonly reason: string
  readonly givenAt: string
  readonly by: string
  readonly until: string
  readonly ended: { readonly at: string, readonly by: string, readonly reason: string } | null
  readonly entry: number | null
}

export interface SwapPart {
  readonly kind: 'swap'
  readonly swapId: number
  readonly tag: string
  readonly timeZone: string
  readonly replaced: string
  readonly failure: string
  readonly workOrder: string | null
  readonly openedAt: string
  readonly by: string
  readonly steps: readonly { readonly at: string, readonly by: string, readonly act: string, readonly text: string, readonly entry: number | null }[]
}

/** 21 CFR 11.50 (a): the name, when, and what the signature meant. */
export interface SignaturePart { readonly kind: 'signature', readonly name: string, readonly at: string, readonly timeZone: string, readonly meaning: string, readonly of: string, readonly words: string | null, readonly entry: number | null }

/** Axes that no file came from in the period. */
export interface NotReadPart { readonly kind: 'not-read', readonly tags: readonly string[] }

export type CountedKind = 'version' | 'mark' | 'finding' | 'planned-change' | 'waiver' | 'swap' | 'signature'
/** The last part: how much the report holds, so that nobody takes a cut one for whole. */
export interface EndPart { readonly kind: 'end', readonly counts: Readonly<Record<CountedKind | 'axis' | 'change', number>> }

export type ReportPart = AxisPart | VersionPart | MarkPart | FindingPart | PlanPart | WaiverPart | SwapPart | SignaturePart | NotReadPart | EndPart
