import { fold, type FoldedLine } from '#shared/checks/fold'
import type { LiveResult } from '#shared/checks/live/types'
import type { CheckResult } from '#shared/checks/types'
import type { Content } from '#shared/settings/types'
import { counted } from '../format'
import type { WordContext } from './fields'
import { listWords } from './lists'
import { missingWords, pointerWords } from './pointer'

export interface CheckLine {
  readonly key: string
  readonly level: CheckResult['level']
  readonly message: string
  /** Where it stands, at most three places by name. */
  readonly places: string
  readonly rules: readonly string[]
  /** What is folded into it. */
  readonly results: readonly CheckResult[]
}

const manyPlaces = 3

function placesOf(line: FoldedLine, content: Content, context: WordContext): string {
  const places = [...new Set(line.results.flatMap(result => result.at).map(at => pointerWords(at, content, context)))]
  return places.length > manyPlaces ? `${places.slice(0, manyPlaces).join(', ')} and ${places.length - manyPlaces} more` : places.join(', ')
}

function messageOf(line: FoldedLine, rules: readonly string[], context: WordContext): string {
  if (line.level !== 'unknown' || !line.missing) return line.message
  return `${counted(rules.length, 'rule waits', 'rules wait')} for ${listWords(line.missing.map(name => missingWords(name, context)))}.`
}

/** Results as lines in the words of the screens: each stop and warning by itself, notes and unknowns folded by what they share. */
export function checkLines(checks: readonly CheckResult[], content: Content, context: WordContext): CheckLine[] {
  return fold(checks).map((line, index) => {
    const rules = [...new Set(line.results.map(result => result.rule))]
    return { key: `${index} ${rules.join()}`, level: line.level, message: messageOf(line, rules, context), places: placesOf(line, content, context), rules, results: line.results }
  })
}

/** '1 stop, 1 warning, 1 accepted; folded below: 2 notes, 3 not judged'; what stands there when nothing speaks up. */
export function checksSentence(all: readonly (CheckResult & { readonly waived?: unknown })[], judged: number): string {
  const checks = all.filter(check => !check.waived)
  const count = (level: CheckResult['level']) => checks.filter(check => check.level === level).length
  const accepted = all.length - checks.length
  const open = [...(count('stop') ? [counted(count('stop'), 'stop', 'stops')] : []), ...(count('warn') ? [counted(count('warn'), 'warning', 'warnings')] : [])]
  const folded = [...(count('note') ? [counted(count('note'), 'note', 'notes')] : []), ...(count('unknown') ? [`${count('unknown')} not judged`] : [])]
  const taken = accepted ? [`${accepted} accepted`] : []
  const rules = counted(judged, 'rule', 'rules')
  if (judged === 0) return 'nothing to judge'
  return [[...(open.length ? open : [`${rules} judged, no stop and no warning`]), ...taken].join(', '), ...(folded.length ? [`folded below: ${folded.join(', ')}`] : [])].join('; ')
}

/** What a rule over several axes says, with the names of what is missing in the words of the screens. */
export function liveMessage({ message, missing = [] }: LiveResult, context: WordContext): string {
  return missing.reduce((text, name) => text.replaceAll(name, missingWords(name, context)), message)
}
