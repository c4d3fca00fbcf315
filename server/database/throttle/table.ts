import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'

/** Failed sign-ins and signatures by account and by peer address; `expire` is milliseconds since 1970, as the library writes it. */
export const throttle = sqliteTable('throttle', {
  key: text('key').primaryKey(),
  points: integer('points').notNull().default(0),
  expire: integer('expire'),
})
