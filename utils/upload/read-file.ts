import { readSettings } from '#shared/settings/read'
import type { FormatError, ReadSettings } from '#shared/settings/types'
import type { Reading } from './model'

const unclear = (errors: readonly FormatError[]) => errors.filter(error => error.code === 'number-unclear').length

/** Whether the answer to "point or comma?" makes numbers clear: in a file cut by commas it cannot. */
function signWouldHelp(bytes: Uint8Array, errors: readonly FormatError[]): boolean {
  if (unclear(errors) === 0) return false
  return (['point', 'comma'] as const).some((decimal) => {
    const again = readSettings(bytes, { decimal })
    return again.ok || unclear(again.errors) < unclear(errors)
  })
}

/** The file read, or why it cannot be. */
export function readFile(bytes: Uint8Array, decimal?: 'point' | 'comma'): ReadSettings | Reading & { state: 'unreadable' } {
  const outcome = readSettings(bytes, decimal ? { decimal } : {})
  if (outcome.ok) return outcome.value
  return { state: 'unreadable', errors: outcome.errors, more: outcome.more, asksSign: !decimal && signWouldHelp(bytes, outcome.errors) }
}
