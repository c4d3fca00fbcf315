import type { Letter, LetterPage, LetterState, OwnLetters, WatchScope } from '#shared/api/letters'
import { counted } from '../format'

export const letterStateWords: Readonly<Record<LetterState, string>> = { queued: 'waits', sent: 'sent', failed: 'failed', dropped: 'not sent' }
export const watchScopeWords: Readonly<Record<WatchScope, string>> = { site: 'the whole site', line: 'the whole line', machine: 'the whole machine', axis: '' }

/** The answer of the page: what waits, and for how long. `span` words a length of time since an instant. */
export function queueSentence({ waiting, waitingSince }: LetterPage['queue'], span: (iso: string) => string): string {
  if (waiting === 0 || waitingSince === null) return 'No letter waits'
  return `${counted(waiting, 'letter waits', 'letters wait')}, ${waiting === 1 ? '' : 'the oldest '}for ${span(waitingSince)}`
}

/** Where letters go, and what to set so that they go further. */
export function waySentence({ way }: LetterPage['queue']): string {
  return way === 'smtp' ? 'Letters leave by the mail server of SMTP_URL.' : 'SMTP_URL is not set: letters go to nobody. They are kept as files in the folder letters of the data folder, and can be read here.'
}

/** What became of a letter, or what happens to it next. */
export function letterOutcome({ state, attempts, problem, nextTryAt }: Pick<Letter, 'state' | 'attempts' | 'problem' | 'nextTryAt'>, short: (iso: string) => string): string {
  if (state === 'sent') return attempts > 1 ? `sent at the ${ordinal(attempts)} try` : 'sent'
  if (state === 'queued') return attempts === 0 || nextTryAt === null || problem === null ? 'waits' : `tried ${counted(attempts, 'time', 'times')}, next ${short(nextTryAt)}`
  return letterStateWords[state]
}

function ordinal(count: number): string {
  const last = count % 10
  const teen = Math.floor(count / 10) % 10 === 1
  return `${count}${teen ? 'th' : { 1: 'st', 2: 'nd', 3: 'rd' }[last] ?? 'th'}`
}

export interface ChoiceGroup { readonly title: string, readonly sentence: string, readonly choices: OwnLetters['choices'] }

const groups = [
  { reach: 'watchers', title: 'Of what you watch', sentence: 'one letter for one event; none of what you did yourself' },
  { reach: 'sites', title: 'Of your sites', sentence: 'whether you watch them or not' },
  { reach: 'vault', title: 'Of the whole vault', sentence: 'for those who answer for it' },
] as const

/** The kinds in the order of how far they reach; groups without a kind are left out. */
export function choiceGroups({ choices }: OwnLetters): readonly ChoiceGroup[] {
  return groups.map(({ reach, ...words }) => ({ ...words, choices: choices.filter(choice => choice.reach === reach) })).filter(group => group.choices.length > 0)
}
