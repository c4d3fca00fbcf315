import { tmpdir } from 'node:os'
import { join } from 'node:path'

/** How large a vault is; kept in a folder that says so, and made once. */
export interface FleetSize {
  readonly axes: number
  readonly versions: number
  /** Axes of one group hold the same settings at the same time, as the same machine built ten times does. */
  readonly group: number
  /** Files of each axis that held nothing new. */
  readonly sightings: number
}

/** What issue and contract promise: 100 versions an axis, about five changes a version. */
export const wholeFleet: FleetSize = { axes: 10_000, versions: 1_000_000, group: 10, sightings: 20 }

export const roundsOf = ({ axes, versions }: FleetSize): number => Math.floor(versions / axes)

export const folderOf = ({ axes, versions, group, sightings }: FleetSize): string => join(tmpdir(), `witnessmark-fleet-${axes}-${versions}-${group}-${sightings}`)

/** Every axis with settings of its own: what git is compared with. */
export const historyAgainstGit: FleetSize = { axes: 100, versions: 10_000, group: 1, sightings: 0 }

/** About 100,000 entries: what memory is compared at. */
export const smallLog: FleetSize = { axes: 400, versions: 40_000, group: 10, sightings: 20 }
