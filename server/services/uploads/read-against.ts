import type { JudgeInput, SiteRule } from '#shared/checks/types'
import type { DiffContext } from '#shared/diff/types'
import { contentOfText } from '#shared/settings/stored-content'
import type { Content, UnitIdentity } from '#shared/settings/types'
import { readContent, readContentText } from '#server/database/content/queries'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { NameplateRow, UnitRow, VersionRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { broughtFrom } from '../forces/brought-from'

/** `text` is the canonical text of `content`, `hash` that of the text. */
export interface HeldVersion { readonly version: VersionRow, readonly content: Content, readonly text: string, readonly hash: string }

/** All that a file of one unit at one axis is compared with and judged by. */
export interface ReadAgainst {
  readonly place: AxisPlace
  /** As the register has it. */
  readonly unit: UnitRow
  /** Newest revision of the registered model. */
  readonly nameplate: NameplateRow | null
  readonly rules: readonly SiteRule[]
  readonly current: HeldVersion | null
  readonly knownGood: HeldVersion | null
}

export function readAgainst(db: VaultDb, place: AxisPlace, unit: UnitRow): ReadAgainst {
  const queries = judgingQueries(db)
  const axisId = place.axis.id
  const marked = knownGoodQueries(db).inForce.get({ axisId })?.mark.versionId
  const current = held(db, versionQueries(db).current.get({ axisId }))
  return {
    place, unit,
    nameplate: queries.nameplate.get({ model: unit.model }) ?? null,
    rules: queries.rules.all({ axisId, machineId: place.machine.id, siteId: place.site.id }).map(({ rule }) => ruleOf(rule)),
    current,
    knownGood: marked === current?.version.id ? current : held(db, marked ? versionQueries(db).byId.get({ id: marked }) : undefined),
  }
}

/** A kept rule as the judge takes it. */
export function ruleOf({ id, scope, field, min, max, fixed, reason }: { id: number, scope: SiteRule['scope'], field: string, min: number | null, max: number | null, fixed: number | string | boolean | null, reason: string }): SiteRule {
  return { id, scope, field, reason, ...(min === null ? {} : { min }), ...(max === null ? {} : { max }), ...(fixed === null ? {} : { fixed }) }
}

/** A version with its content. */
export function held(db: VaultDb, version: VersionRow | undefined): HeldVersion | null {
  if (!version) return null
  const { text, hash } = readContentText(db, version.contentId)
  return { version, text, hash, content: contentOfText(text) }
}

/** Weights and watching of the axis, as every difference of it is told. */
export function diffContextOf({ place, nameplate }: Pick<ReadAgainst, 'place' | 'nameplate'>): DiffContext {
  const { dictionary } = nameplate?.nameplate ?? {}
  return { flags: place.axis.flags, watched: place.site.watched, ...(dictionary ? { dictionary } : {}) }
}

/** What stood on the axis before the content that is judged; some rules judge the step, not the state. */
export interface Before { readonly content?: Content, readonly forces?: JudgeInput['broughtFrom'] }
const none: Before = {}

/** What a content read from the unit is a step from. */
export function beforeOf(db: VaultDb, { place, unit, current }: Pick<ReadAgainst, 'place' | 'unit' | 'current'>, base: VersionRow | null): Before {
  if (base === null) return none
  const forces = broughtFrom(db, place.axis.id, unit, base)
  return { content: base.id === current?.version.id ? current.content : readContent(db, base.contentId), ...(forces ? { forces } : {}) }
}

export function judgeInputOf(against: ReadAgainst, content: Content, { model, firmware }: Pick<UnitIdentity, 'model' | 'firmware'>, before: Before = none): JudgeInput {
  const { place, unit, nameplate, rules, knownGood } = against
  const { controllerScanMs } = place.machine
  return {
    content, rules,
    axis: { axisKind: place.axis.axisKind, flags: place.axis.flags, ...(place.axis.duty ? { duty: place.axis.duty } : {}), ...(controllerScanMs === null ? {} : { controllerScan: controllerScanMs }) },
    unit: { model, ...(firmware === undefined ? {} : { firmware }) },
    registered: { model: unit.model },
    ...(before.content ? { before: { content: before.content } } : {}),
    ...(before.forces ? { broughtFrom: before.forces } : {}),
    ...(nameplate ? { nameplate: nameplate.nameplate } : {}),
    ...(knownGood ? { knownGood: { content: knownGood.content, ...(knownGood.version.firmware === null ? {} : { firmware: knownGood.version.firmware }) } } : {}),
  }
}
