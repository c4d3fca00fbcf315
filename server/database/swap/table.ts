import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { readBackProblems } from '#shared/api/swaps'
import type { meanings } from '#shared/api/versions'
import type { Verdict } from '#shared/diff/types'
import type { Adjustment, Blocking, Fit, ReadBackComparison, ReplacedPart, SwapState } from '#shared/swap/types'
import type { UnitState } from '../unit/table'
import { flag, id, instant, json } from '../columns'

/** A person by id, and when. */
export interface By { readonly by: number, readonly at: string }

/** What was ticked between two steps, for the unit now in. */
export interface SwapTicks {
  readonly kit?: By
  readonly lines?: readonly (By & { readonly line: string, readonly words: string })[]
  readonly written?: By
  readonly verdict?: By & { readonly attempt: number }
  readonly motion?: By
}

/** What the steps of a swap said and still holds; what belongs to one unit in ends when another comes in. */
export interface SwapFacts {
  /** The rev with which the unit now in came in, and when: read-backs count from there. */
  readonly since?: { readonly rev: number, readonly at: string }
  /** Where only the actuator is changed: the old one. */
  readonly actuatorOut?: { readonly serial: string | null, readonly model: string | null }
  readonly chosen?: { readonly decidedBy: string, readonly reason: string }
  readonly unfit?: { readonly by: string, readonly at: string, readonly reason: string, readonly enteredBy: number }
  readonly forces?: By & { readonly adjustments: readonly Adjustment[] }
  readonly cautions?: By
  readonly safe?: By & { readonly blocked: Blocking | null }
  readonly ticks?: SwapTicks
  readonly draft?: By & { readonly note: string }
  readonly firstMotion?: { readonly speedPercent: number, /** Of the newest result. */ readonly rev: number, /** Each as it was given, oldest first. */ readonly results: readonly (By & { readonly item: string, readonly outcome: 'ok' | 'fault', readonly text: string | null })[] }
  readonly running?: By & { readonly note: string | null }
  readonly released?: By & { readonly meaning: (typeof meanings)[number], readonly note: string | null, readonly carriedOver: boolean, readonly oldUnitState: UnitState | null }
  readonly abandoned?: By & { readonly reason: string }
}

/** Where a swap stands; derived from its steps, and edited with rev. */
export const swap = sqliteTable('swap', {
  id: id(),
  rev: integer('rev').notNull(),
  axisId: integer('axis_id').notNull(),
  replaced: text('replaced').$type<ReplacedPart>().notNull(),
  failure: text('failure').notNull(),
  workOrder: text('work_order'),
  step: text('step').$type<SwapState>().notNull(),
  unitOutId: integer('unit_out_id'),
  unitInId: integer('unit_in_id'),
  putBack: flag('put_back').notNull(),
  fit: text('fit').$type<Fit>(),
  sourceVersionId: integer('source_version_id'),
  sourceMarkId: integer('source_mark_id'),
  facts: json<SwapFacts>('facts').notNull(),
  openedAt: instant('opened_at').notNull(),
  openedBy: integer('opened_by').notNull(),
  changedAt: instant('changed_at').notNull(),
  runningAt: instant('running_at'),
})
export type SwapRow = typeof swap.$inferSelect

/** One step, as it was said; append-only. */
export const swapStep = sqliteTable('swap_step', {
  id: id(),
  swapId: integer('swap_id').notNull(),
  rev: integer('rev').notNull(),
  act: text('act').notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  text: text('text').notNull(),
  said: json<Readonly<Record<string, unknown>>>('said').notNull(),
})
export type SwapStepRow = typeof swapStep.$inferSelect

export const readBack = sqliteTable('read_back', {
  id: id(),
  swapId: integer('swap_id').notNull(),
  attempt: integer('attempt').notNull(),
  rev: integer('rev').notNull(),
  uploadId: integer('upload_id').notNull(),
  sha256: text('sha256').notNull(),
  versionId: integer('version_id'),
  problem: text('problem').$type<(typeof readBackProblems)[number]>(),
  detail: text('detail'),
  verdict: text('verdict').$type<Verdict>(),
  compared: json<ReadBackComparison | null>('compared'),
  kitCode: text('kit_code'),
  afterFirstMotion: flag('after_first_motion').notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
})
export type ReadBackRow = typeof readBack.$inferSelect

export const firmwareGap = sqliteTable('firmware_gap', {
  id: id(),
  model: text('model').notNull(),
  firmware: text('firmware').notNull(),
  key: text('key').notNull(),
  swapId: integer('swap_id').notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  allowedBy: text('allowed_by'),
  reason: text('reason').notNull(),
})
export type FirmwareGapRow = typeof firmwareGap.$inferSelect
