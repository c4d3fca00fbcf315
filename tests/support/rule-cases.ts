import { expect, it } from 'vitest'
import { ruleOf } from '../../shared/checks/table'
import type { JudgeInput, Level } from '../../shared/checks/types'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { Content, Move, Setup } from '../../shared/settings/types'
import { absolute, judgeInput, linear, plate, soundPlate, soundSetup } from './check-input'

/*
 * Cases of rules as rows: what is changed on one sound axis, and the levels that the rule answers with, in its order.
 */

/** What differs from the sound axis; undefined takes a value away, `plate: null` the whole nameplate. */
export interface Change {
  readonly setup?: { readonly [Name in keyof Setup]?: Setup[Name] | undefined }
  readonly plate?: { readonly [Name in keyof Nameplate]?: Nameplate[Name] | undefined } | null
  readonly moves?: readonly Move[]
  readonly content?: Partial<Content>
  readonly input?: Partial<JudgeInput>
}
const given = <Values extends object>(values: Values) => Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined))

/** The axis that the rows change. */
export interface Sound { readonly setup: Setup, readonly plate: Nameplate, readonly content: (setup: Setup, moves: readonly Move[], rest?: Partial<Content>) => Content }
const soundLinear: Sound = { setup: soundSetup, plate: soundPlate, content: linear }

function levelsOf(sound: Sound, rule: string, { setup, plate: changed, moves = [absolute(1, 100)], content, input }: Change): readonly Level[] | 'not applicable' {
  const nameplate = changed === null ? {} : { nameplate: plate(given({ ...sound.plate, ...changed })) }
  const all = judgeInput(sound.content(given({ ...sound.setup, ...setup }), moves, content), { ...nameplate, ...input })
  const found = ruleOf(rule)
  if (!found) throw new RangeError(`No such rule: ${rule}`)
  return found.applies(all) ? found.judge(all).map(({ level }) => level) : 'not applicable'
}

export type Case = readonly [words: string, change: Change, levels: readonly Level[] | 'not applicable']

/** One rule held to its rows, on the linear axis where none is given. */
export const holdsCasesOn = (sound: Sound) => (rule: string, list: readonly Case[]): void => {
  it.each(list)('%s', (_words, change, levels) => expect(levelsOf(sound, rule, change)).toEqual(levels))
}
export const holdsCases = holdsCasesOn(soundLinear)

/** No level of a rule is left without a row, and none of the rules always stops or warns. */
export function reachesItsLevels(cases: Readonly<Record<string, readonly Case[]>>): void {
  for (const [rule, list] of Object.entries(cases)) {
    const reached = list.flatMap(([, , levels]) => levels === 'not applicable' ? [] : levels)
    expect([...new Set(reached)].sort(), rule).toEqual([...ruleOf(rule)?.levels ?? []].sort())
    expect(list.some(([, , levels]) => levels !== 'not applicable' && !levels.some(level => level === 'stop' || level === 'warn' || level === 'unknown')), rule).toBe(true)
  }
}
