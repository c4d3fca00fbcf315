import type { Outcome } from './outcome'
import { counted } from '../format'

export interface Sent { readonly name: string, readonly outcome: Outcome, readonly forecast: number | null }

export interface ReceiptLine {
  readonly count: number
  readonly words: string
  readonly kind: Outcome['kind']
  readonly entries: readonly { readonly text: string, readonly to: string | null, readonly why: string | null }[]
}

/** Another upload came in between, where the number is not the one that was foretold. */
function versionText(outcome: Outcome & { kind: 'version' }, forecast: number | null): { text: string, why: string | null } {
  const moved = forecast !== null && forecast !== outcome.number
  return { text: `${outcome.tag} v${outcome.number}`, why: moved ? `not v${forecast}: another upload came in between` : null }
}

const words: Readonly<Record<Outcome['kind'], (count: number) => string>> = {
  version: count => count === 1 ? 'new version' : 'new versions',
  seen: () => 'seen again',
  tray: () => 'in the tray, nothing lost',
  unreadable: () => 'not readable, kept in the tray as it came',
  refused: () => 'not stored; the file is still in this page',
}

function entry({ name, outcome, forecast }: Sent): ReceiptLine['entries'][number] {
  switch (outcome.kind) {
    case 'version': return { ...versionText(outcome, forecast), to: `/axes/${outcome.tag}/versions/${outcome.number}` }
    case 'seen': return { text: `${outcome.tag} v${outcome.number}`, to: `/axes/${outcome.tag}`, why: null }
    case 'tray': return { text: `place ${name}`, to: `/tray#tray-${outcome.trayId}`, why: outcome.detail }
    case 'unreadable': return { text: `mend ${name}`, to: outcome.trayId === null ? null : `/tray#tray-${outcome.trayId}`, why: null }
    case 'refused': return { text: name, to: null, why: outcome.why }
  }
}

/** What became of all that was sent, one line a kind, those that want a person last. */
export function receipt(sent: readonly Sent[]): ReceiptLine[] {
  const kinds = ['version', 'seen', 'tray', 'unreadable', 'refused'] as const
  return kinds.flatMap((kind) => {
    const held = sent.filter(one => one.outcome.kind === kind)
    return held.length === 0 ? [] : [{ kind, count: held.length, words: words[kind](held.length), entries: held.map(entry) }]
  })
}

/** How many findings of the sent files wait for an explanation. */
export function findingsWaiting(sent: readonly Sent[]): string | null {
  const count = sent.reduce((sum, { outcome }) => sum + (outcome.kind === 'version' ? outcome.findings : 0), 0)
  return count === 0 ? null : `${counted(count, 'finding waits', 'findings wait')} for an explanation`
}
