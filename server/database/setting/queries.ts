import { eq, sql } from 'drizzle-orm'
import type { Vault, Write } from '../client'
import { prepared } from '../prepared'
import { setting } from './table'

/** Everything that is set for the whole vault. */
export type SettingKey = 'plant' | 'trail-key'
export type SettingValue = typeof setting.$inferSelect['value']

const queries = prepared(db => ({ byKey: db.select().from(setting).where(eq(setting.key, sql.placeholder('key'))).prepare() }))

/** null = not set. */
export const readSetting = (vault: Vault, key: SettingKey): SettingValue => queries(vault.db).byKey.get({ key })?.value ?? null

/** Sets and logs it. */
export function writeSetting(vault: Vault, write: Write, key: SettingKey, value: SettingValue): void {
  const row = { key, value, changedAt: write.now }
  vault.db.insert(setting).values(row).onConflictDoUpdate({ target: setting.key, set: row }).run()
  write.log({ act: 'setting-changed', id: key, state: row })
}
