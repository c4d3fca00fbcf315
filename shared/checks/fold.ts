import { inWords } from './format'
import { ruleOf } from './table'
import type { CheckResult, Level } from './types'

/** One line of the list: a stop or a warning by itself, the notes of one rule, or the unknowns that wait for one thing. */
export interface FoldedLine {
  readonly level: Level
  readonly message: string
  readonly results: readonly CheckResult[]
  /** stop, warn and note: the rule that speaks. */
  readonly rule?: string
  /** unknown: what they wait for. */
  readonly missing?: readonly string[]
}

/** The lines that a person reads first, in the order of the results. Every result stands in a line, an unknown in one for each thing that it misses. */
export function fold(results: readonly CheckResult[]): FoldedLine[] {
  const of = (level: Level) => results.filter(result => result.level === level)
  const single = ({ rule, level, message }: CheckResult, result: CheckResult): FoldedLine => ({ rule, level, message, results: [result] })
  return [
    ...of('stop').map(result => single(result, result)),
    ...of('warn').map(result => single(result, result)),
    ...notes(of('note')),
    ...waiting(of('unknown')),
  ]
}

function notes(results: readonly CheckResult[]): FoldedLine[] {
  return [...grouped(results, result => [result.rule])].map(([rule, group]) => ({
    rule,
    level: 'note',
    message: group.length === 1 ? group.map(note => note.message).join() : `${ruleOf(rule)?.title ?? rule}: ${group.length} notes.`,
    results: group,
  }))
}

/** Things that the same rules wait for share a line. */
function waiting(results: readonly CheckResult[]): FoldedLine[] {
  const lines = new Map<string, { rules: string[], missing: string[], results: Set<CheckResult> }>()
  for (const [missing, group] of grouped(results, result => result.missing ?? [])) {
    const rules = [...new Set(group.map(result => result.rule))]
    const line = lines.get(rules.join()) ?? { rules, missing: [], results: new Set() }
    line.missing.push(missing)
    group.forEach(result => line.results.add(result))
    lines.set(rules.join(), line)
  }
  return [...lines.values()].map(line => ({
    level: 'unknown',
    message: `${line.rules.length === 1 ? '1 rule waits' : `${line.rules.length} rules wait`} for ${inWords(line.missing)}`,
    missing: line.missing,
    results: [...line.results],
  }))
}

function grouped(results: readonly CheckResult[], keysOf: (result: CheckResult) => readonly string[]): Map<string, CheckResult[]> {
  const groups = new Map<string, CheckResult[]>()
  for (const result of results) {
    for (const key of keysOf(result)) {
      const group = groups.get(key)
      if (group) group.push(result)
      else groups.set(key, [result])
    }
  }
  return groups
}
