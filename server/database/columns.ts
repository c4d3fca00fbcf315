import { customType, integer, text } from 'drizzle-orm/sqlite-core'

/** RFC 3339 UTC with milliseconds: `2026-03-09T14:32:00.000Z`. Comparing two as text compares the times. */
export type Instant = string

export const id = () => integer('id').primaryKey()
export const instant = (name: string) => text(name).$type<Instant>()
/** 0 or 1; anything else is damage, and throws where the library's own mode would read it as false. */
export const flag = (name: string) => customType<{ data: boolean, driverData: number | null }>({
  dataType: () => 'integer',
  toDriver: value => (value === null ? null : value ? 1 : 0),
  fromDriver: (value) => {
    if (value !== 0 && value !== 1) throw new SyntaxError(`A flag holds 0 or 1, not ${value}.`)
    return value === 1
  },
})(name)
/** JSON text; null goes in as NULL through placeholders too, where the library's own JSON mode would write the text `null`. */
export const json = <Value>(name: string) => customType<{ data: Value, driverData: string | null }>({
  dataType: () => 'text',
  toDriver: value => (value === null ? null : JSON.stringify(value)),
  fromDriver: text => JSON.parse(text ?? 'null') as Value,
})(name)
