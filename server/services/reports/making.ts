import type { Report } from '#shared/api/reports'
import type { Vault } from '#server/database/client'

/** Files of reports that are being made in this process: known to whoever waits for one, kept nowhere. */
const underWay = new WeakMap<Vault, Map<number, NonNullable<Report['making']>>>()

/** How far the file of a report has come; null where none is being made. */
export const makingOf = (vault: Vault, id: number): Report['making'] => underWay.get(vault)?.get(id) ?? null

/** Says how far it has come; null: it is made, or whoever took it went away. */
export function noteMaking(vault: Vault, id: number, making: Report['making']): void {
  const known = underWay.get(vault) ?? new Map<number, NonNullable<Report['making']>>()
  underWay.set(vault, known)
  if (making === null) known.delete(id)
  else known.set(id, making)
}
