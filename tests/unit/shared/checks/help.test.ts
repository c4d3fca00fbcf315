import { evaluate } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { helpOf, ruleHelp } from '../../../../shared/checks/help'
import { rules } from '../../../../shared/checks/table'
import { helpInputs } from '../../../support/help-inputs'

/** Numbers that stand by themselves: digits in type codes, tags and units are none. */
function numbersIn(text: string): number[] {
  return [...text.matchAll(/(?<![\w.-])\d+(?:\.\d+)?(?![\w.]*\w)/g)].map(([digits]) => Number(digits))
}

/** All numbers in what a rule was given, without their signs, move and zone numbers and how many there are of a list among them. */
function numbersOf(value: unknown): number[] {
  if (typeof value === 'number') return [Math.abs(value)]
  if (typeof value !== 'object' || value === null) return []
  return [...Array.isArray(value) ? [value.length] : [], ...Object.values(value).flatMap(numbersOf)]
}

/** Parts of a reckoning that are arithmetic; the words in front of it aside. */
function arithmeticIn(reckoned: string): string[] {
  return reckoned.split(/;|:| and /)
    .map(part => part.replace(/^[^\d(−]*= /, '').replace(/^(?!floor|sin)[a-z ]+(?=\d|\()/i, '').replaceAll('−', '-').replaceAll('·', '*').replaceAll('√', 'sqrt').replace(/sin (\d+)°/g, 'sin($1 deg)').trim())
    .filter(part => /[<>=]/.test(part) && /^(?:[\d.\s()+*/^<>=-]|sin\(\d+ deg\)|floor|sqrt)+$/.test(part))
}

/** Whether each side of each sign stands to the next as the sign says; what was rounded to four digits counts as equal. */
function holds(part: string): boolean {
  const [first = '', ...rest] = part.split(/(<=|>=|<|>|=)/)
  let left = Number(evaluate(first))
  for (let i = 0; i < rest.length; i += 2) {
    const right = Number(evaluate(rest[i + 1] ?? ''))
    const same = Math.abs(left - right) <= 1e-4 * Math.abs(right)
    if (rest[i] === '=' ? !same : rest[i] === '<' ? left >= right : rest[i] === '>' ? left <= right : rest[i] === '<=' ? left > right : left < right) return false
    left = right
  }
  return true
}

/** Numbers of the formulas themselves: per cent, millimetres a metre, standard gravity, how many sisters. */
const constants = [0, 1, 2, 4, 5, 100, 1000, 9.80665]
const near = (numbers: readonly number[], number: number) => numbers.some(one => Math.abs(one - number) <= 1e-9 * Math.max(1, Math.abs(one)))
const examples = Object.entries(ruleHelp)

describe('the examples of the help page', () => {
  it('are there for every rule of the table, and for no rule that is not', () => {
    for (const { id } of rules) expect(helpOf(id)).toBeDefined()
    expect([...helpInputs.keys()].sort()).toEqual(Object.keys(ruleHelp).sort())
    expect(helpOf('no-such-rule')).toBeUndefined()
    expect(helpOf('constructor')).toBeUndefined()
  })

  it.each(examples)('%s: the rule says what the example says', (id, { level, result }) => {
    const [first] = helpInputs.get(id)!.results
    expect(`${first!.level}: ${first!.message}`).toBe(`${level}: ${result}`)
    expect(first!.rule).toBe(id)
  })

  it.each(examples)('%s: the words give the numbers of the input, and only those', (id, { given }) => {
    const input = numbersOf(helpInputs.get(id)!.input)
    for (const number of numbersIn(given)) expect(near(input, number), `${number} is no input`).toBe(true)
  })

  it.each(examples)('%s: the reckoning goes from these numbers to those of the result', (id, { given, reckoned, result }) => {
    const [first] = helpInputs.get(id)!.results
    const known = [...numbersIn(given), ...numbersIn(result), ...numbersOf(first!.values), ...constants]
    const computed = arithmeticIn(reckoned).flatMap(part => part.split('=').slice(1)).flatMap(numbersIn)
    for (const number of numbersIn(reckoned)) expect(near([...known, ...computed], number), `${number} comes from nowhere`).toBe(true)
  })

  it.each(examples)('%s: the arithmetic is right', (_id, { reckoned }) => {
    for (const part of arithmeticIn(reckoned)) expect(holds(part), part).toBe(true)
  })

  it('know arithmetic from words, and right from wrong', () => {
    expect(arithmeticIn('h = −(−3) = 3; hard stops 3 and 3 + 200 + 2 · 1 = 205; all fields equal')).toEqual(['-(-3) = 3', '3 + 200 + 2 * 1 = 205'])
    expect(arithmeticIn('(8 + 2) · 9.80665 · sin 90° = 98.0665; next = 9: no such row')).toEqual(['(8 + 2) * 9.80665 * sin(90 deg) = 98.0665'])
    expect(['5 - 3 = 2', '2 < 4', '2^3 = 8', '4 <= 4', '4 >= 4'].map(holds)).toEqual([true, true, true, true, true])
    expect(['5 - 3 = 3', '4 < 4', '4 > 4', '5 <= 4', '3 >= 4'].map(holds)).toEqual([false, false, false, false, false])
    expect(examples.filter(([, { reckoned }]) => arithmeticIn(reckoned).length > 0).length).toBeGreaterThanOrEqual(20)
    expect(numbersIn('HL40-200V on LID-02.Z: K-017 is 4.5 mm/s², 30 %.')).toEqual([4.5, 30])
  })

  it.each(examples)('%s: each part is a sentence or a formula of its own', (_id, { given, reckoned, remedy }) => {
    for (const text of [given, remedy]) expect(text).toMatch(/^[A-Z0-9].*\.$/)
    expect(remedy.slice(0, -1)).not.toMatch(/\. /)
    expect(reckoned).not.toMatch(/\.$/)
  })
})
