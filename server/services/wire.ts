import type { z } from 'zod'
import type { changeSchema, checkSchema, contentSchema, judgedSchema, waivableCheck } from '#shared/api/versions'
import type { FieldChange } from '#shared/diff/types'
import type { Content } from '#shared/settings/types'
import type { StoredJudgement } from '#server/database/check/queries'

/*
 * What is read-only inside travels as plain data: the same keys and values in the shapes of shared/api.
 */

export type WireChange = z.infer<typeof changeSchema>
export type WireCheck = z.infer<typeof checkSchema>
export type WireWaivableCheck = z.infer<typeof waivableCheck>
export type WireContent = z.infer<typeof contentSchema>
export type WireJudged = z.infer<typeof judgedSchema>

export function changesOnWire(changes: readonly FieldChange[]): WireChange[] {
  return changes.map(({ affects, ...change }) => (affects ? { ...change, affects: [...affects] } : change))
}

export function contentOnWire({ axisKind, extra, moves, setup, zones }: Content): WireContent {
  return { axisKind, extra: { ...extra }, moves: moves.map(move => ({ ...move })), setup: { ...setup }, zones: [...zones] }
}

export function judgedOnWire({ ruleSet, nameplateRevision, judgedAt, judged, notApplicable }: StoredJudgement): WireJudged {
  return { ruleSet, nameplateRevision, judgedAt, judged, notApplicable }
}
