import type { Role } from '#shared/api/common'
import { addressOf } from '~/utils/addresses'

export interface Entry {
  readonly to: string
  readonly word: string
  /** Stands in the bottom row of a phone; the others are in its menu. */
  readonly first?: true
  /** Set apart to the right of the desk's rule: what is set up once. */
  readonly late?: true
  /** Whose work it is; everybody's where absent. */
  readonly for?: readonly Role[]
}

export const entries: readonly Entry[] = [
  { to: addressOf.board(), word: 'Board', first: true },
  { to: addressOf.upload(), word: 'Upload', first: true, for: ['technician', 'planner'] },
  { to: addressOf.swaps(), word: 'Swaps', first: true },
  { to: addressOf.tray(), word: 'Tray', first: true, for: ['technician', 'planner'] },
  { to: addressOf.units(), word: 'Units' },
  { to: addressOf.findings(), word: 'Findings' },
  { to: addressOf.planned(), word: 'Planned', for: ['planner', 'auditor'] },
  { to: addressOf.history(), word: 'History', for: ['planner', 'auditor'] },
  { to: addressOf.trail(), word: 'Trail', for: ['planner', 'auditor', 'admin'] },
  { to: addressOf.places(), word: 'Places' },
  { to: addressOf.nameplates(), word: 'Nameplates', late: true },
  { to: addressOf.rules(), word: 'Rules', late: true },
  { to: addressOf.people(), word: 'People', late: true, for: ['admin'] },
  { to: addressOf.letters(), word: 'Letters', late: true, for: ['admin'] },
  { to: addressOf.format(), word: 'Format', late: true },
  { to: addressOf.interface(), word: 'Interface', late: true },
  { to: addressOf.help(), word: 'Help', late: true },
]

/** The entries of a person's work, among the pages there are. */
export function entriesFor(roles: readonly Role[], paths: ReadonlySet<string>): readonly Entry[] {
  return entries.filter(entry => paths.has(entry.to) && (!entry.for || entry.for.some(role => roles.includes(role))))
}

/** Whether an address lies at or under the entry; the board only at itself. */
export function isCurrent(entry: Entry, path: string): boolean {
  return path === entry.to || (entry.to !== addressOf.board() && path.startsWith(`${entry.to}/`))
}
