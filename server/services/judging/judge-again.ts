import type { z } from 'zod'
import type { judgedAgain } from '#shared/api/judging'
import { judge } from '#shared/checks/judge'
import type { CheckResult, Judgement } from '#shared/checks/types'
import { Refusal } from '#shared/errors/refusal'
import type { SettingsFile } from '#shared/settings/types'
import type { Actor } from '#server/database/actor'
import { countByLevel, insertJudgement, readJudgement, type StoredJudgement } from '#server/database/check/queries'
import type { Vault, Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { refreshAxisState } from '../axes/axis-state'
import { beforeOf, judgeInputOf, readAgainst, type ReadAgainst } from '../uploads/read-against'
import { raiseNewStops, standingStops } from '../findings/stops'
import { fileOf, versionRow } from '../versions/read-version'
import { waivedOnWire } from '../waivers/accepted'
import { judgedOnWire } from '../wire'

/** A stored version as it is judged today, and what it is judged against. */
export interface Today { readonly against: ReadAgainst, readonly file: SettingsFile, readonly judgement: Judgement }

/** Judges a stored version by the nameplate and the rules of today; stores nothing. */
export function judgeToday(db: VaultDb, version: VersionRow): Today {
  const place = judgingQueries(db).axis.get({ id: version.axisId })
  const unit = unitRows(db).byId.get({ id: version.unitId })
  if (!place || !unit) throw new Refusal('not-found', 'The axis or the unit of this version is not there.')
  const against = readAgainst(db, place, unit)
  const current = against.current?.version.id === version.id ? against.current.content : undefined
  const file = fileOf(db, version, current)
  return { against, file, judgement: judge(judgeInputOf(against, file, file.unit, beforeOf(db, against, version.baseId === null ? null : versionRow(db, version.baseId)))) }
}

/** Whether it says something else than the judgement that is kept. */
export function saysOtherwise({ judgement }: Today, kept: StoredJudgement): boolean {
  return textOf(judgement.results) !== textOf(kept.results)
}

/** Members in one order, as a rule may name them in another than the vault reads them. */
function textOf(results: readonly CheckResult[]): string {
  return JSON.stringify(results.map(({ rule, level, at, message, values, missing }) => [rule, level, at, message, values, missing]))
}

/** Whether it says something else, or the same by another rule set or another revision of the nameplate. */
export function differsFromKept(today: Today, kept: StoredJudgement): boolean {
  const revision = today.against.nameplate?.revision ?? null
  return today.judgement.ruleSet !== kept.ruleSet || revision !== kept.nameplateRevision || saysOtherwise(today, kept)
}

/** Keeps a judgement beside those before it and logs that it was made; the caller derives the state of the axis anew. */
export function keepJudgement(db: VaultDb, write: Write, versionId: number, { judgement, against, file }: Today): void {
  const nameplateRevisionId = against.nameplate?.id ?? null
  const before = readJudgement(db, versionId)
  const id = insertJudgement(db, versionId, judgement, nameplateRevisionId, write.now)
  const { ruleSet, judged, notApplicable, results } = judgement
  write.log({ act: 'version-judged', id, state: { id, versionId, ruleSet, nameplateRevisionId, judgedAt: write.now, judged, notApplicable, ...countByLevel(results) } })
  raiseWhatStops(db, write, versionId, { judgement, against, file }, before)
}

/** Stops of the current version that did not stand before this judgement. */
function raiseWhatStops(db: VaultDb, write: Write, versionId: number, { judgement, against, file }: Today, before: StoredJudgement): void {
  const { current, place, nameplate } = against
  if (current?.version.id !== versionId) return
  const standing = (of: Judgement) => standingStops(db, place.axis.id, of, () => file, write.now)
  raiseNewStops(db, write, place, current.version, standing(judgement), standing(before), `${judgement.ruleSet} ${nameplate?.id ?? ''}`)
}

/** Judges one version again and keeps the judgement, also where it says the same. */
export function judgeVersion(vault: Vault, actor: Actor, versionId: number): z.infer<typeof judgedAgain> {
  return vault.write(actor, (write) => {
    const { db } = vault
    const version = versionRow(db, versionId)
    const today = judgeToday(db, version)
    const changed = saysOtherwise(today, readJudgement(db, versionId))
    keepJudgement(db, write, versionId, today)
    refreshAxisState(db, version.axisId)
    const kept = readJudgement(db, versionId)
    return { changed, checks: waivedOnWire(db, version.axisId, kept, () => today.file, write.now), judged: judgedOnWire(kept) }
  })
}
