import { readEntryFile } from '#shared/settings/entry-table/read-entry'
import { readSettings } from '#shared/settings/read'
import type { FormatError, ReadSettings } from '#shared/settings/types'
import type { ListedFile, Reading } from './model'

const unclear = (errors: readonly FormatError[]) => errors.filter(error => error.code === 'number-unclear').length

/** Whether the answer to "point or comma?" makes numbers clear: in a file cut by commas it cannot. */
function signWouldHelp(bytes: Uint8Array, errors: readonly FormatError[]): boolean {
  if (unclear(errors) === 0) return false
  return (['point', 'comma'] as const).some((decimal) => {
    const again = readSettings(bytes, { decimal })
    return again.ok || unclear(again.errors) < unclear(errors)
  })
}

/** Whether it is another layout than ours rather than ours with faults in it. */
function mayBeList(name: string, [first]: readonly FormatError[]): boolean {
  return first?.code === 'header' || first?.code === 'csv-syntax' || (first?.code === 'json-syntax' && !/\.json$/i.test(name))
}

/** The file read, or why it cannot be. */
export function readFile({ name, bytes, decimal, layout }: Pick<ListedFile, 'name' | 'bytes' | 'decimal' | 'layout'>): ReadSettings | Reading & { state: 'unreadable' } {
  if (layout) {
    const { plate, serial, capturedAt } = layout
    const read = readEntryFile(bytes, plate, { ...(serial === undefined ? {} : { serial }), ...(capturedAt === undefined ? {} : { exportedAt: capturedAt }) })
    return read.ok ? read.value : { state: 'unreadable', errors: read.errors, more: read.more, asksLayout: true }
  }
  const outcome = readSettings(bytes, decimal ? { decimal } : {})
  if (outcome.ok) return outcome.value
  return { state: 'unreadable', errors: outcome.errors, more: outcome.more, asksSign: !decimal && signWouldHelp(bytes, outcome.errors), asksLayout: mayBeList(name, outcome.errors) }
}
