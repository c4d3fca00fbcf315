import { judge } from '#shared/checks/judge'
import { ruleSetVersion } from '#shared/checks/table'
import type { CheckResult, Judgement } from '#shared/checks/types'
import { diffContents } from '#shared/diff/diff'
import type { FieldChange } from '#shared/diff/types'
import { canonicalJson } from '#shared/settings/canonical'
import type { Content } from '#shared/settings/types'
import type { Entry } from '#shared/trail/entry'
import { countByLevel } from '#server/database/check/queries'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { firstJudgement, judgementOf, keptChanges, type KeptJudgement } from '#server/database/verify/derived'
import { versionQueries } from '#server/database/version/queries'
import { engineVersion } from '../uploads/ingest'
import { diffContextOf, judgeInputOf, type ReadAgainst } from '../uploads/read-against'
import { foldRegister } from './as-of'
import type { Faults } from './faults'

/** What was recomputed, and what was made by an older engine or rule set and could not be. */
export interface Derived { versions: number, judgements: number, older: number }

/**
 * Computes changes and judgements again as they were computed then, by the register as it stood at the entry, and names
 * what is kept otherwise. Give it every entry in order.
 */
export function deriveAgain(db: VaultDb, faults: Faults): { readonly read: (entry: Entry) => void, readonly derived: Derived } {
  const register = foldRegister()
  const derived: Derived = { versions: 0, judgements: 0, older: 0 }
  const judged = (record: string, against: ReadAgainst, version: VersionRow, kept: KeptJudgement | undefined) => {
    if (kept === undefined) return faults.add(record, 'its judgement is gone')
    // Versions of before say nothing of their rules; those of now do, and the log with them.
    const rules = record.startsWith('version') ? /, rules (\d+)/.exec(version.engine)?.[1] : undefined
    if (rules !== undefined && rules !== kept.set.ruleSet) return faults.add(record, `its judgement names rules ${kept.set.ruleSet}, and the version was judged by rules ${rules}`)
    if (kept.set.ruleSet !== ruleSetVersion) {
      derived.older += 1
      return
    }
    derived.judgements += 1
    const fault = judgementFault(judgeAsThen(db, against, version), against, kept)
    if (fault === null && record.startsWith('version') && kept.set.judgedAt !== version.receivedAt) faults.add(record, 'its judgement is of another time than the version')
    if (fault !== null) faults.add(record, fault)
  }
  const compared = (record: string, against: ReadAgainst, version: VersionRow) => {
    if (!version.engine.startsWith(engineVersion)) {
      derived.older += 1
      return
    }
    derived.versions += 1
    if (textOf(changesAsThen(db, against, version)) !== textOf(asChanges(keptChanges(db, version.id)))) faults.add(record, 'its kept changes are not those between its content and its base')
  }
  return {
    derived,
    read: (entry) => {
      register.read(entry)
      const { act, subject: { id }, state } = entry
      if (act !== 'version-stored' && act !== 'version-judged') return
      const version = versionQueries(db).byId.get({ id: Number(act === 'version-stored' ? id : state.versionId) })
      const against = version && register.against(db, version.axisId, version.unitId)
      // A version that is gone or whose place never was is named by the fold.
      if (!version || !against) return
      const record = act === 'version-stored' ? `version ${id}` : `check set ${id}`
      try {
        judged(record, against, version, act === 'version-stored' ? firstJudgement(db, version.id) : judgementOf(db, Number(id)))
        if (act === 'version-stored') compared(record, against, version)
      }
      catch (error) {
        // A damaged content throws wherever it is used; the record is named, and the next one is looked at.
        faults.add(record, `cannot be computed again: ${error instanceof Error ? error.message : String(error)}`)
      }
    },
  }
}

const contentOf = (db: VaultDb, versionId: number | null): Content | null => {
  const version = versionId === null ? undefined : versionQueries(db).byId.get({ id: versionId })
  return version ? readContent(db, version.contentId) : null
}

function changesAsThen(db: VaultDb, against: ReadAgainst, version: VersionRow): readonly FieldChange[] {
  const base = contentOf(db, version.baseId)
  return base ? diffContents(base, readContent(db, version.contentId), diffContextOf(against)) : []
}

function judgeAsThen(db: VaultDb, against: ReadAgainst, version: VersionRow): Judgement {
  const content = contentOf(db, version.baseId)
  return judge(judgeInputOf(against, readContent(db, version.contentId), version.file.unit, content ? { content } : undefined))
}

/** Judged by what a swap confirms, which is no part of the register: its results are left as they are kept. */
const besides = 'force-rescale'
const named = (rules: readonly string[]) => rules.filter(rule => rule !== besides)

function judgementFault(now: Judgement, { nameplate }: ReadAgainst, { set, results }: KeptJudgement): string | null {
  if (set.nameplateRevisionId !== (nameplate?.id ?? null)) return 'its judgement names another nameplate revision than stood then'
  if (textOf(named(now.judged)) !== textOf(named(set.judged)) || textOf(named(now.notApplicable)) !== textOf(named(set.notApplicable))) return 'its judgement names other rules than were judged then'
  if (textOf(toldOf(now.results)) !== textOf(toldOf(results))) return 'its kept check results are not those of its content'
  return textOf(countByLevel(results)) === textOf({ stop: set.stop, warn: set.warn, note: set.note, unknown: set.unknown }) ? null : 'its judgement counts other results than it has'
}

interface Told extends Pick<CheckResult, 'rule' | 'level' | 'at' | 'message' | 'values'> { readonly missing?: readonly string[] | null }

const toldOf = (results: readonly Told[]) => results.filter(({ rule }) => rule !== besides)
  .map(({ rule, level, at, message, values, missing }) => ({ rule, level, at, message, values, missing: missing ?? null }))

function asChanges(rows: ReturnType<typeof keptChanges>): object[] {
  return rows.map(({ versionId: _version, seq: _seq, ...fields }) => Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== null)))
}

const textOf = (value: unknown) => canonicalJson(JSON.parse(JSON.stringify(value)) as Parameters<typeof canonicalJson>[0])
