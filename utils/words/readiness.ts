import type { BoardAxis } from '#shared/api/board'
import type { Lack } from '#shared/api/readiness'
import { addressOf } from '~/utils/addresses'

/** In two words, for a list and to be searched by. */
export const lackWords: Readonly<Record<Lack, string>> = {
  'no-known-good': 'no known-good', 'too-old': 'known-good too old', 'overdue': 'upload overdue', 'no-spare': 'no spare fits', 'no-attachment': 'no backup attached', 'no-label': 'no label printed',
}

/** What readiness of an axis is told from, on the board and on its own page. */
export interface Unready {
  readonly tag: string
  readonly model: string | null
  readonly current: { readonly number: number } | null
  readonly knownGood: { readonly number: number } | null
}
export interface WhyNot { readonly lack: Lack, readonly words: string, readonly action: string, readonly to: string }

/** Why the axis could not be restored tonight, and what to do, one line a reason. */
export function whyNot({ tag, model, current, knownGood }: Unready, lacks: readonly Lack[]): WhyNot[] {
  const marked = knownGood ?? current
  const tellings: Readonly<Record<Lack, Omit<WhyNot, 'lack'>>> = {
    'no-known-good': current
      ? { words: `Version ${current.number} stands, but nobody has marked it known-good.`, action: `Review version ${current.number}`, to: addressOf.version(tag, current.number) }
      : { words: 'Nothing was ever uploaded from this drive.', action: 'Upload it', to: addressOf.upload() },
    'too-old': { words: 'The known-good is older than this site allows.', action: `Review version ${current?.number ?? ''}`, to: current ? addressOf.version(tag, current.number) : addressOf.axis(tag) },
    'overdue': { words: current ? 'The last upload is longer ago than its interval.' : 'The first upload is overdue.', action: 'Upload it', to: addressOf.upload() },
    'no-spare': { words: model === null ? 'No unit is fitted, so that nobody knows which spare would fit.' : `No spare in stock fits ${model}.`, action: 'See the units', to: addressOf.units() },
    'no-attachment': { words: 'The drive tool’s own backup is not attached to the known-good.', action: `Attach it to version ${marked?.number ?? ''}`, to: marked ? addressOf.version(tag, marked.number) : addressOf.axis(tag) },
    'no-label': { words: 'No label with this tag was printed.', action: 'Print the label', to: addressOf.label(tag) },
  }
  return lacks.map(lack => ({ lack, ...tellings[lack] }))
}

/** How many of them are named at the head of the board. */
export const namedUnready = 4

const collator = new Intl.Collator('en', { numeric: true, sensitivity: 'base' })
const gravity = ({ lacks }: BoardAxis) => (lacks.includes('no-known-good') ? 100 : 0) + lacks.length

/** The first axes that could not be restored tonight: those without a known-good, then by how much they lack, then by tag. One pass: a fleet has thousands. */
export function firstUnready(axes: readonly BoardAxis[]): BoardAxis[] {
  const first: BoardAxis[] = []
  for (const axis of axes) {
    if (axis.lacks.length === 0) continue
    const at = first.findIndex(one => gravity(axis) > gravity(one) || (gravity(axis) === gravity(one) && collator.compare(axis.tag, one.tag) < 0))
    first.splice(at < 0 ? first.length : at, 0, axis)
    if (first.length > namedUnready) first.pop()
  }
  return first
}
