import { minus } from '../motion/exact'
import type { Answers } from './answers'
import { quantity } from './format'
import type { CheckResult } from './types'

/** A value that the settings ask for, and the words that begin its sentence. */
export interface Asked { readonly at: string, readonly words: string, readonly value: number, readonly move?: number }

/** The values above a limit, all of them above -Infinity: of hundreds that a table asks for few are told, and the rest need no words. */
export type AskedAbove = (limit: number) => readonly Asked[]

/** Stops for values above what the unit can do; one unknown for all where the nameplate does not tell. */
export function aboveNameplate(say: Answers, subject: string, asked: AskedAbove, unit: string, field: string, most: number | undefined): CheckResult[] {
  if (most === undefined) return [say.unknown(subject, [`nameplate.${field}`], [...new Set(asked(-Infinity).map(({ at }) => at))])]
  return asked(most).map(({ at, words, value, move }) => say.stop([at],
    `${words} of ${quantity(value, unit)} is ${quantity(minus(value, most), unit)} above the ${quantity(most, unit)} that the unit can do.`,
    { ...move === undefined ? {} : { move }, value, limit: most }))
}

/** Warnings for moves above the setup's own limit: the drive clips them; nothing where the setup has no such limit. */
export function aboveSetup(say: Answers, asked: AskedAbove, unit: string, limitAt: string, most: number | undefined): CheckResult[] {
  if (most === undefined) return []
  return asked(most).map(({ at, words, value, move }) => say.warn([at, limitAt],
    `${words} of ${quantity(value, unit)} is above the setup's limit of ${quantity(most, unit)}: the drive clips it and the move takes longer than it says.`,
    { ...move === undefined ? {} : { move }, value, limit: most }))
}
