import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Role } from '#shared/api/common'
import { flag, id, instant, json } from '../columns'

/** Someone who signs in. People who leave are ended; their names stay. An empty list of sites means all of them. */
export const person = sqliteTable('person', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  name: text('name').notNull(),
  email: text('email').notNull(),
  roles: json<Role[]>('roles').notNull(),
  siteIds: json<number[]>('site_ids').notNull(),
  shared: flag('shared').notNull().default(false),
  passwordHash: text('password_hash'),
  passwordSetAt: instant('password_set_at'),
  madeAt: instant('made_at').notNull(),
  endedAt: instant('ended_at'),
  lastSignInAt: instant('last_sign_in_at'),
})
export type PersonRow = typeof person.$inferSelect
