import type { z } from 'zod'
import type { Problem } from '#shared/api/common'

/** What is wrong, by the name of the field; '' holds what belongs to no field. */
export type Issues = Readonly<Record<string, string>>

type Issue = z.core.$ZodIssue

const atLeast = (issue: Issue & { code: 'too_small' }) => {
  if (issue.origin === 'string') return issue.minimum === 1 ? 'Needed' : `At least ${issue.minimum} characters`
  if (issue.origin === 'array') return 'Choose at least one'
  return issue.inclusive ? `At least ${issue.minimum}` : `More than ${issue.minimum}`
}
const atMost = (issue: Issue & { code: 'too_big' }) => {
  if (issue.origin === 'string') return `At most ${issue.maximum} characters`
  if (issue.origin === 'array') return `At most ${issue.maximum} of them`
  return `At most ${issue.maximum}`
}
const kinds: Readonly<Record<string, string>> = { number: 'Write a number with a point, like 12.5', int: 'Write a whole number', boolean: 'Choose yes or no', string: 'Needed', array: 'Choose at least one' }
const formats: Readonly<Record<string, string>> = { email: 'Write an e-mail address, name@plant.example', datetime: 'Write a day and a time' }

function words(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type': return issue.input === undefined && issue.expected !== 'array' ? 'Needed' : kinds[issue.expected] ?? issue.message
    case 'too_small': return atLeast(issue)
    case 'too_big': return atMost(issue)
    case 'invalid_format': return formats[issue.format] ?? issue.message
    case 'invalid_value': return issue.input === undefined ? 'Choose one' : `One of ${issue.values.join(', ')}`
    case 'unrecognized_keys': return `Not known here: ${issue.keys.join(', ')}`
    default: return issue.message
  }
}

/** The first thing wrong with each field, in our words. Parse with `reportInput`, so that what is missing can be told from what is wrong. */
export function issuesOf(error: z.ZodError): Issues {
  const found: Record<string, string> = {}
  for (const issue of error.issues) {
    const field = issue.path.length === 0 ? '' : String(issue.path[0])
    found[field] ??= issue.path.length > 1 ? `${issue.path.slice(1).map(String).join(' ')}: ${words(issue)}` : words(issue)
  }
  return found
}

/** The places of a refusal by the vault; a place that the form does not show goes to ''. */
export function issuesOfProblem(problem: Problem, names: readonly string[]): Issues {
  const found: Record<string, string> = {}
  for (const { at, message } of problem.errors ?? []) {
    const name = at.split('/').filter(part => part !== '' && part !== 'body')[0] ?? ''
    const key = names.includes(name) ? name : ''
    found[key] = found[key] ? `${found[key]}. ${message}` : message
  }
  return found
}
