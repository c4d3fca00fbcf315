import { integer, text } from 'drizzle-orm/sqlite-core'

/** RFC 3339 UTC with milliseconds: `2026-03-09T14:32:00.000Z`. Comparing two as text compares the times. */
export type Instant = string

export const id = () => integer('id').primaryKey()
export const instant = (name: string) => text(name).$type<Instant>()
export const flag = (name: string) => integer(name, { mode: 'boolean' })
export const json = <Value>(name: string) => text(name, { mode: 'json' }).$type<Value>()
