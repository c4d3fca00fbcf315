import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { tokenScopes } from '#shared/api/people'
import { id, instant, json } from '../columns'

export type TokenScope = (typeof tokenScopes)[number]

/** What a script shows. The owner answers for it and it ends with them; an empty list of sites means all of the owner's. */
export const token = sqliteTable('token', {
  id: id(),
  name: text('name').notNull(),
  secretHash: text('secret_hash').notNull(),
  scopes: json<TokenScope[]>('scopes').notNull(),
  siteIds: json<number[]>('site_ids').notNull(),
  ownerId: integer('owner_id').notNull(),
  madeBy: integer('made_by').notNull(),
  madeAt: instant('made_at').notNull(),
  endsAt: instant('ends_at').notNull(),
  endedAt: instant('ended_at'),
  lastUsedAt: instant('last_used_at'),
})
export type TokenRow = typeof token.$inferSelect
