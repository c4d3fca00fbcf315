import { z } from 'zod'
import { idSchema, instantSchema, listQuery, pageOf, roles, type Role } from './common'

interface LetterKindTerms {
  /** Who may have it at all. */
  readonly may: readonly Role[]
  /** Who gets it without having chosen. */
  readonly unasked: readonly Role[]
  /** `watchers`: those who watch the axis. `sites`: everyone within the sites it speaks of. `vault`: only people without site bounds. */
  readonly reach: 'watchers' | 'sites' | 'vault'
  readonly says: string
}

/** Every kind of letter: who may have it, who has it unless they say otherwise, and how far it reaches. */
export const letterKinds = {
  'swap-unreleased': { may: roles, unasked: roles, reach: 'watchers', says: 'A swapped unit runs longer than the site allows without being released.' },
  'swap-released': { may: roles, unasked: roles, reach: 'watchers', says: 'A swapped unit was released.' },
  'unfit-gone-on': { may: roles, unasked: roles, reach: 'watchers', says: 'A swap goes on with a unit that does not fit.' },
  'watched-change': { may: roles, unasked: roles, reach: 'watchers', says: 'A watched value changed.' },
  'finding-opened': { may: roles, unasked: roles, reach: 'watchers', says: 'A finding was opened: something that a person must explain.' },
  'finding-overdue': { may: roles, unasked: roles, reach: 'watchers', says: 'A finding stands open past its day.' },
  'overdue-digest': { may: roles, unasked: ['planner'], reach: 'sites', says: 'Once a day: the axes whose upload is overdue. No letter when there are none.' },
  'checkpoint': { may: ['auditor'], unasked: ['auditor'], reach: 'vault', says: 'Once a day: the signed checkpoint of the trail. Keep it elsewhere: only then does it prove anything.' },
  'verification-failed': { may: ['auditor', 'admin'], unasked: ['auditor', 'admin'], reach: 'vault', says: 'The nightly verification of the trail failed.' },
  'copy-failed': { may: ['admin'], unasked: ['admin'], reach: 'vault', says: 'An off-site copy failed.' },
} as const satisfies Readonly<Record<string, LetterKindTerms>>

export type LetterKind = keyof typeof letterKinds
export type LetterKindOf<Reach extends LetterKindTerms['reach']> = { [Kind in LetterKind]: (typeof letterKinds)[Kind]['reach'] extends Reach ? Kind : never }[LetterKind]
export const letterKindNames = Object.keys(letterKinds) as [LetterKind, ...LetterKind[]]
/** The terms of a kind, widened from the literals of the table. */
export const termsOf = (kind: LetterKind): LetterKindTerms => letterKinds[kind]

export const letterStates = ['queued', 'sent', 'failed', 'dropped'] as const
export type LetterState = (typeof letterStates)[number]

export const letterQuery = listQuery.extend({ state: z.enum(letterStates).optional() })
export const letterSchema = z.object({
  id: idSchema, kind: z.enum(letterKindNames), to: z.object({ id: idSchema, name: z.string(), email: z.string() }), title: z.string(), path: z.string(),
  state: z.enum(letterStates), madeAt: instantSchema, attempts: z.int(),
  /** When it is tried next; null once it is settled. */
  nextTryAt: instantSchema.nullable(), settledAt: instantSchema.nullable(),
  /** Why it was not sent, or why the last try failed. */
  problem: z.string().nullable(),
})
export type Letter = z.infer<typeof letterSchema>
/** The text is written when asked, by the address that PUBLIC_URL says today. */
export const letterOne = letterSchema.extend({ messageId: z.string(), text: z.string() })
export type LetterOne = z.infer<typeof letterOne>
export const letterQueue = z.object({
  waiting: z.int(), waitingSince: instantSchema.nullable().describe('when the oldest that waits was written'),
  /** smtp: by the server of SMTP_URL. folder: as files into the data folder, because SMTP_URL is not set. */
  way: z.enum(['smtp', 'folder']), publicUrl: z.boolean().describe('PUBLIC_URL is set: letters say whole addresses'),
})
export const letterPage = pageOf(letterSchema).extend({ queue: letterQueue })
export type LetterPage = z.infer<typeof letterPage>

export const watchScopes = ['site', 'line', 'machine', 'axis'] as const
export type WatchScope = (typeof watchScopes)[number]
export const watchSchema = z.object({ scope: z.enum(watchScopes), scopeId: idSchema, name: z.string() })
export type Watch = z.infer<typeof watchSchema>

export const ownLetters = z.object({
  choices: z.array(z.object({ kind: z.enum(letterKindNames), says: z.string(), reach: z.enum(['watchers', 'sites', 'vault']), wanted: z.boolean() })),
  watches: z.array(watchSchema),
})
export type OwnLetters = z.infer<typeof ownLetters>
export const letterChoiceBody = z.strictObject({ kind: z.enum(letterKindNames), wanted: z.boolean() })
export const watchBody = z.strictObject({ scope: z.enum(watchScopes), scopeId: idSchema, watched: z.boolean() })
