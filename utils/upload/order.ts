import { hasStop, wantsReason, type ListedFile, type Reading } from './model'

export const groups = ['stop', 'watched', 'unreadable', 'unknown', 'unjudged', 'quiet', 'waits'] as const
export type Group = (typeof groups)[number]

/** What needs a person stands first; what needs nobody can be folded. */
export function groupOf(reading: Reading): Group {
  if (hasStop(reading)) return 'stop'
  if (wantsReason(reading)) return 'watched'
  switch (reading.state) {
    case 'unreadable': return 'unreadable'
    case 'unplaced': return 'unknown'
    case 'unjudged': return 'unjudged'
    case 'waits': return 'waits'
    default: return 'quiet'
  }
}

/** Among the quiet ones: motion, text, nothing but the home offset or known-good again, seen again, twins. */
function quietRank(reading: Reading): number {
  if (reading.state === 'twin') return 5
  if (reading.state !== 'placed') return 0
  if (reading.identical) return 4
  if (reading.sameAsKnownGood) return 3
  return reading.changes.some(change => change.weight !== 'text') ? 1 : 2
}

const labelOf = (file: ListedFile) => file.reading.state === 'placed' ? file.reading.axis.tag : file.name

const byName = new Intl.Collator('en', { numeric: true })

export function inOrder(files: readonly ListedFile[]): ListedFile[] {
  const keyed = files.map(file => ({ file, group: groups.indexOf(groupOf(file.reading)), quiet: quietRank(file.reading), label: labelOf(file) }))
  keyed.sort((a, b) => a.group - b.group || a.quiet - b.quiet || byName.compare(a.label, b.label) || a.file.id - b.file.id)
  return keyed.map(one => one.file)
}

export interface QuietLine { readonly line: string, readonly files: readonly ListedFile[] }

/** The quiet ones of a long list, one row a line of the plant: the part of the tag before its dot names the machine. */
export function quietByMachine(files: readonly ListedFile[]): QuietLine[] {
  const byMachine = new Map<string, ListedFile[]>()
  for (const file of files) {
    const line = file.reading.state === 'placed' ? file.reading.axis.tag.split('.')[0] ?? '' : 'left out'
    byMachine.set(line, [...byMachine.get(line) ?? [], file])
  }
  return [...byMachine].map(([line, held]) => ({ line, files: held })).sort((a, b) => byName.compare(a.line, b.line))
}
