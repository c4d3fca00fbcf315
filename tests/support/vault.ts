import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { openVault, type Vault, type VaultOptions } from '../../server/database/client'

/** Low enough that a suite with many sign-ins stays fast; a test asserts the cost that is used in earnest. */
export const testScryptCost = 1024

/** A vault of its own in a new folder under the system's temporary one; `remove` closes it and takes the folder away. */
export function freshVault(options: VaultOptions = {}): { vault: Vault, folder: string, remove: () => void } {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
  const vault = openVault(folder, { scryptCost: testScryptCost, ...options })
  return {
    vault, folder,
    remove: () => {
      if (vault.sqlite.open) vault.close()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}
