import type { Attention } from '#shared/api/board'
import { addressOf } from '~/utils/addresses'

interface Telling { readonly one: string, readonly many: string, readonly action: string }

const tellings: Record<Attention['kind'], Telling> = {
  'swap-unreleased': { one: 'swap not released', many: 'swaps not released', action: 'Release' },
  'finding': { one: 'open finding', many: 'open findings', action: 'Explain' },
  'stop-check': { one: 'stop check', many: 'stop checks', action: 'Judge' },
  'off-known-good': { one: 'axis off known-good', many: 'axes off known-good', action: 'Compare' },
  'unmarked': { one: 'axis without known-good', many: 'axes without known-good', action: 'Review' },
  'overdue': { one: 'upload overdue', many: 'uploads overdue', action: 'Upload' },
  'never-read': { one: 'axis never uploaded', many: 'axes never uploaded', action: 'Upload' },
  'tray': { one: 'file in the tray', many: 'files in the tray', action: 'Place it' },
}

export interface Need {
  readonly kind: Attention['kind']
  readonly count: number
  readonly words: string
  readonly action: string
  readonly to: string
  /** The worst by name; its text ends in the others by tag: 'by 6 harm values; CAS-01.X, LID-02.Z and 3 more'. */
  readonly first?: { readonly tag: string, readonly to?: string, readonly text: string }
  readonly since: string | null
}

/** One line of what needs someone now: what, which, how long, and the one thing to press. */
export function needOf(attention: Attention): Need {
  const { kind, count, items, since } = attention
  const telling = tellings[kind]
  const [first, ...rest] = items
  const named = rest.map(item => item.tag).filter(Boolean)
  const unnamed = count - 1 - named.length
  const others = [named.join(', '), unnamed > 0 ? `${named.length > 0 ? 'and ' : ''}${unnamed} more` : ''].filter(Boolean).join(' ')
  return {
    kind, count, since,
    words: count === 1 ? telling.one : telling.many,
    action: telling.action,
    to: whereTo(attention),
    first: first && { tag: first.tag, to: first.axisId !== null ? addressOf.axis(first.tag) : undefined, text: others ? `${first.text.replace(/\.$/, '')}; ${others}` : first.text },
  }
}

function whereTo({ kind, count, items: [first] }: Attention): string {
  if (kind === 'swap-unreleased') return addressOf.swaps(count === 1 ? first?.tag : undefined)
  if (kind === 'finding') return count === 1 && first?.findingId ? addressOf.finding(first.findingId) : addressOf.findings()
  if (kind === 'tray') return addressOf.tray()
  if (kind === 'overdue' || kind === 'never-read' || !first) return addressOf.upload()
  if (kind === 'off-known-good' && first.knownGoodId !== null && first.versionId !== null) return addressOf.changes(first.knownGoodId, first.versionId)
  return addressOf.axis(first.tag)
}
