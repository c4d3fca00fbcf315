import type { Finding, FindingAct, FindingCause, PlannedChange } from '#shared/api/findings'
import { counted, sayValue } from '../format'
import { ruleField } from '../rules/fields'

export const causeWords: Readonly<Record<FindingCause, string>> = {
  'watched-change': 'a watched value changed',
  'stop-check': 'a stop check',
  'read-back': 'a read-back differs from the kit',
  'off-known-good': 'off known-good for longer than the site allows',
  'unfit': 'a swap goes on with a unit that does not fit',
  'axis-disagrees': 'a file was sent for another axis',
  'verification': 'the verification of the trail failed',
}

/** What is to be done next, and by whom. */
export function nextWords({ state, weight }: Pick<Finding, 'state' | 'weight'>): string {
  if (state === 'open') return 'Nobody has said why. Whoever knows, explains it.'
  if (state === 'closed') return 'Closed. It can be reopened; all that was said stays.'
  return weight === 'harm' ? 'Explained. An auditor who did not explain it closes it.' : 'Explained. A planner or an auditor who did not explain it closes it.'
}

/** `Finding 12: a watched value changed, harm, LID-02.Z`. */
export function findingSentence({ id, cause, weight, tag, versions, more }: Finding): string {
  const axes = new Set(versions.map(version => version.tag)).size
  return `Finding ${id}: ${causeWords[cause]}; ${weight}; ${axes > 1 || more > 0 ? counted(axes + more, 'axis', 'axes') : tag ?? 'the vault itself'}`
}

const actWords = { explained: 'explained', closed: 'closed it', reopened: 'reopened it' } as const

/** What someone did, as the beginning of a sentence: `Ines Okafor closed it as accepted, allowed by Marit`. */
export function actSentence({ kind, by, as, allowedBy, version, plannedChangeId }: FindingAct): string {
  if (kind === 'explained' && plannedChangeId !== null) return `${by} announced it before it was made`
  const how = as === 'accepted' ? ` as accepted, allowed by ${allowedBy ?? 'nobody named'}` : as === 'put-right' && version ? ` as put right by ${version.tag} v${version.number}` : ''
  return `${by} ${actWords[kind]}${how}`
}

export interface Beside { readonly label: string, readonly value: string }

/** What an explanation names besides its words; `exact` writes an instant. */
export function besideAct({ madeBy, madeAt, workOrder }: FindingAct, exact: (iso: string) => string): Beside[] {
  const parts = [['Done by', madeBy], ['Done at', madeAt === null ? null : exact(madeAt)], ['Work order', workOrder]] as const
  return parts.flatMap(([label, value]) => value === null ? [] : [{ label, value }])
}

/** `thrust limit, 40 to 60 %; jog speed, at most 20 mm/s`: what an announced change may be. */
export function plannedWords({ ranges }: Pick<PlannedChange, 'ranges'>): string {
  return ranges.map(({ field, min, max }) => {
    const known = ruleField(field)
    const unit = known?.unit ?? ''
    const range = min !== null && max !== null ? `${sayValue(min)} to ${sayValue(max, unit)}` : min !== null ? `at least ${sayValue(min, unit)}` : max !== null ? `at most ${sayValue(max, unit)}` : 'any value'
    return `${known?.label ?? field}, ${range}`
  }).join('; ')
}

export type PlanState = 'called off' | 'to come' | 'holds' | 'over'

export function planState({ from, until, endedAt }: Pick<PlannedChange, 'from' | 'until' | 'endedAt'>, now: Date): PlanState {
  if (endedAt !== null) return 'called off'
  if (now.getTime() < Date.parse(from)) return 'to come'
  return now.getTime() < Date.parse(until) ? 'holds' : 'over'
}
