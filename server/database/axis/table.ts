import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { AxisFlag, AxisKind } from '#shared/settings/types'
import { id, instant, json } from '../columns'

/** Which moves a cycle makes, in order, and how long the cycle takes, ms. */
export interface Duty { moves: number[], cycleTime: number }

export const axis = sqliteTable('axis', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  machineId: integer('machine_id').notNull(),
  tag: text('tag').notNull(),
  axisKind: text('axis_kind').$type<AxisKind>().notNull(),
  role: text('role').notNull().default(''),
  flags: json<AxisFlag[]>('flags').notNull().default([]),
  bus: text('bus').notNull().default(''),
  uploadEveryHours: integer('upload_every_hours'),
  duty: json<Duty>('duty'),
  madeAt: instant('made_at').notNull(),
})
export type AxisRow = typeof axis.$inferSelect
