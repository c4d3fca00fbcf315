import type { Vault } from '#server/database/client'
import { readSetting } from '#server/database/setting/queries'

/** The name at the head of every page; empty until it is set. */
export const plantOf = (vault: Vault): string => String(readSetting(vault, 'plant') ?? '')
