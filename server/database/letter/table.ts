import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { LetterKind, LetterState } from '#shared/api/letters'
import { flag, id, instant, json } from '../columns'

/** An e-mail to send, and what became of it. The Message-ID stays the same over every try. */
export const letter = sqliteTable('letter', {
  id: id(),
  messageId: text('message_id').notNull(),
  personId: integer('person_id').notNull(),
  kind: text('kind').$type<LetterKind>().notNull(),
  cause: text('cause').notNull(),
  axisId: integer('axis_id'),
  siteIds: json<number[]>('site_ids').notNull(),
  title: text('title').notNull(),
  paragraphs: json<string[]>('paragraphs').notNull(),
  path: text('path').notNull(),
  madeAt: instant('made_at').notNull(),
  state: text('state').$type<LetterState>().notNull(),
  attempts: integer('attempts').notNull(),
  nextTryAt: instant('next_try_at'),
  /** Until then someone is sending it; after that the sender is taken for dead. */
  leasedUntil: instant('leased_until'),
  settledAt: instant('settled_at'),
  problem: text('problem'),
})
export type LetterRow = typeof letter.$inferSelect

/** What a person said about a kind of letter; without a row the table of kinds says. */
export const letterChoice = sqliteTable('letter_choice', {
  id: id(),
  personId: integer('person_id').notNull(),
  kind: text('kind').$type<LetterKind>().notNull(),
  wanted: flag('wanted').notNull(),
  chosenAt: instant('chosen_at').notNull(),
})
export type LetterChoiceRow = typeof letterChoice.$inferSelect
