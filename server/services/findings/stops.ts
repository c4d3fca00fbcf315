import { createHash } from 'node:crypto'
import type { CheckResult, Judgement } from '#shared/checks/types'
import type { Content } from '#shared/settings/types'
import type { Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { waived } from '../waivers/accepted'
import { raiseFinding, type Raised } from './raise'

/** The stops of one rule that a version stands under and no waiver covers. */
export interface StandingStop { readonly rule: string, readonly results: readonly [CheckResult, ...CheckResult[]] }

/** What stops in a judgement, rule by rule in their order; what a waiver covers now is left out. */
export function standingStops(db: VaultDb, axisId: number, judgement: Judgement, content: () => Content, now: string): StandingStop[] {
  if (!judgement.results.some(({ level }) => level === 'stop')) return []
  const rules = new Map<string, [CheckResult, ...CheckResult[]]>()
  for (const result of waived(db, axisId, judgement, content, now).judgement.results.filter(({ level }) => level === 'stop')) {
    const key = `${result.rule} ${siteRuleOf(result) ?? ''}`
    const known = rules.get(key)
    if (known) known.push(result)
    else rules.set(key, [result])
  }
  return [...rules.values()].map(results => ({ rule: results[0].rule, results }))
}

/** The id of the site rule that a result speaks of; one rule of a site is one cause, however many axes it hits. */
const siteRuleOf = ({ rule, values }: CheckResult): number | null => (rule === 'site-rule' && typeof values.ruleId === 'number' ? values.ruleId : null)

/** axis + rule + places: the places as one short word. */
export function stopKey(axisId: number, { rule, results }: StandingStop): string {
  const places = results.flatMap(({ at }) => at).sort().join('\n')
  return `axis:${axisId}:stop:${rule}:${siteRuleOf(results[0]) ?? ''}:${createHash('sha256').update(places).digest('hex').slice(0, 16)}`
}

/** Where it was found. */
interface At { readonly axis: { readonly id: number, readonly tag: string }, readonly site: { readonly id: number } }

/** Raises what stops a version that was stored: one finding a rule and its places. */
export function raiseStops(db: VaultDb, write: Write, { axis, site }: At, version: Pick<VersionRow, 'id' | 'baseId'>, stops: readonly StandingStop[]): Raised[] {
  return stops.map(stop => raiseFinding(db, write, {
    cause: 'stop-check', causeKey: stopKey(axis.id, stop), siteId: site.id, weight: 'harm', title: `${axis.tag}: ${said(stop)}`,
    showings: [{ axisId: axis.id, versionId: version.id, baseId: version.baseId, says: said(stop) }],
  }))
}

/**
 * Raises what stops a version that was judged again and did not before. What many axes have from one cause (a new rule of the
 * site, a new revision of a nameplate) is one finding with a list.
 */
export function raiseNewStops(db: VaultDb, write: Write, { axis, site }: At, version: Pick<VersionRow, 'id' | 'baseId'>, stops: readonly StandingStop[], before: readonly StandingStop[], judgedBy: string): void {
  const known = new Set(before.map(stop => stopKey(axis.id, stop)))
  for (const stop of stops.filter(one => !known.has(stopKey(axis.id, one)))) {
    const ruleId = siteRuleOf(stop.results[0])
    raiseFinding(db, write, {
      cause: 'stop-check', causeKey: `site:${site.id}:judged:${ruleId === null ? `${stop.rule}:${judgedBy}` : `rule ${ruleId}`}`, siteId: site.id, weight: 'harm',
      title: `Judged again: ${said(stop)}`, showings: [{ axisId: axis.id, versionId: version.id, baseId: version.baseId, says: said(stop) }],
    })
  }
}

function said({ results: [first, ...rest] }: StandingStop): string {
  return rest.length === 0 ? first.message : `${first.message} And ${rest.length} more.`
}
