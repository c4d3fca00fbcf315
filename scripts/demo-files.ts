import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import type { Role } from '../shared/api/common'
import type { TokenScope } from '../server/database/token/table'
import type { Nameplate } from '../shared/settings/nameplate'
import type { AxisFlag, AxisKind, Move } from '../shared/settings/types'

/** The invented plant as its file has it. */
export interface Plant {
  readonly plant: string
  readonly site: { readonly name: string, readonly timeZone: string }
  readonly people: readonly { readonly key: string, readonly name: string, readonly email: string, readonly roles: Role[], readonly password: string }[]
  readonly token: { readonly name: string, readonly scopes: TokenScope[] }
  readonly nameplates: readonly Nameplate[]
  readonly lines: readonly { readonly name: string, readonly controllerScanMs: number, readonly machines: readonly string[] }[]
  readonly axes: readonly { readonly tag: string, readonly role: string, readonly axisKind: AxisKind, readonly flags: AxisFlag[], readonly uploadEveryHours: number, readonly bus: string, readonly unit: { readonly serial: string, readonly model: string, readonly firmware: string } }[]
  /** Tags of axes that have no printed label. */
  readonly unlabelled: readonly string[]
  readonly spares: readonly { readonly serial: string, readonly model: string, readonly firmware: string, readonly location: string }[]
}

/** A settings file in its JSON form, as the fixtures hold it. */
export interface FileJson {
  unit: Record<string, string>
  exportedAt: string
  setup: Record<string, number | string | boolean>
  moves: Move[]
  [key: string]: unknown
}

/** What is laid over the file of the act before. */
export interface Patch {
  readonly unit?: Record<string, string>
  readonly setup?: Record<string, number | string | boolean>
  readonly moves?: Record<string, Partial<Move>>
  readonly insert?: { readonly before: number, readonly move: Move }
}

/** A unit swapped at night: played from the first step to the last that it names, some minutes each. */
export interface SwapAct {
  readonly act: 'swap'
  readonly axis: string
  readonly by: string
  readonly serial: string
  readonly failure: string
  readonly workOrder: string
  readonly blocked: 'prop' | 'pin' | 'lowered'
  readonly until: 'running' | 'released'
  readonly note?: string
  /** What was taught at the machine, and stands in the read-back. */
  readonly taught: Record<string, number>
  readonly releasedBy?: string
  readonly oldUnitState?: 'repair' | 'scrapped' | 'spare'
}

interface When { readonly daysAgo: number, readonly time: string }
export type Act = When & (
  | { readonly act: 'upload', readonly axis: string, readonly by: string, readonly occasion: 'commissioning' | 'routine' | 'as-found' | 'as-left', readonly reason?: string, readonly workOrder?: string, readonly changedBy?: string, readonly allowedBy?: string, readonly patch?: Patch, readonly undo?: boolean, readonly capturedDaysAgo?: number, /** Sent as the drive's own list, by the entry table of its model. */ readonly list?: boolean }
  | { readonly act: 'upload', readonly file: string, readonly by: string, readonly occasion: 'routine' | 'as-found' }
  | { readonly act: 'nightly', readonly by: string, readonly skip?: readonly string[] }
  | { readonly act: 'mark' | 'none', readonly axis: string, readonly by: string, readonly meaning?: 'reviewed' | 'approved' | 'responsibility', readonly note?: string }
  /** Accepts a stop of the newest version for some days from then on. */
  | { readonly act: 'waive', readonly axis: string, readonly by: string, readonly rule: string, readonly days: number, readonly reason: string }
  | { readonly act: 'void', readonly axis: string, readonly by: string, readonly reason: string }
  | { readonly act: 'fit', readonly axis: string, readonly serial: string, readonly by: string, readonly oldState: 'failed' | 'spare' }
  /** Closes every finding that was explained until then. */
  | { readonly act: 'close', readonly by: string, readonly allowedBy: string }
  /** Watches the whole site. */
  | { readonly act: 'watch', readonly by: string }
  | { readonly act: 'plan', readonly by: string, readonly axes: readonly string[], readonly fields: readonly string[], readonly hours: number, readonly reason: string, readonly allowedBy: string }
  | SwapAct
  | { readonly act: 'rule', readonly by: string, readonly rule: { readonly scope: 'axis', readonly axis: string, readonly field: string, readonly max: number, readonly reason: string } }
)

const larkfield = (name: string) => fileURLToPath(new URL(`../fixtures/larkfield/${name}`, import.meta.url))

/** A file of the plant's folder, as it is. */
export const fixtureBytes = (name: string): Buffer => readFileSync(larkfield(name))
export const plantFile = (): Plant => JSON.parse(fixtureBytes('plant.json').toString()) as Plant
export const storyFile = (): readonly Act[] => (JSON.parse(fixtureBytes('story.json').toString()) as { acts: Act[] }).acts
export const settingsFile = (tag: string): FileJson => JSON.parse(fixtureBytes(`settings/${tag.toLowerCase()}.json`).toString()) as FileJson
