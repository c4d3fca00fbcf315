import type { LifeEvent } from '#shared/api/versions'
import { weightWords, worstWeight, type StripState } from '../strip-words'

/** What happened, what stands beside it, and the strip that says it at a glance. */
export interface LifeLine {
  readonly what: string
  readonly beside: string
  readonly state: StripState
  readonly label: string
}

const join = (parts: readonly (string | null | undefined)[]) => parts.filter(Boolean).join('; ')

function versionLine(event: LifeEvent): LifeLine {
  const changed = event.changes ? weightWords(event.changes) : ''
  const seen = event.sightings && event.sightings > 0 ? `seen the same ${event.sightings} ${event.sightings === 1 ? 'time' : 'times'} since` : null
  const weight = event.changes ? worstWeight(event.changes) : undefined
  return {
    what: `v${event.number ?? ''}${event.occasion ? `, ${event.occasion}` : ''}`,
    beside: join([changed && `${changed} against the version before`, event.text, seen, event.by]),
    state: event.changes === null ? 'new' : weight ? 'off' : 'in-line',
    label: event.changes === null ? 'first version' : changed ? `changed: ${changed}` : 'nothing changed',
  }
}

const others: Readonly<Record<Exclude<LifeEvent['kind'], 'version'>, (event: LifeEvent) => Omit<LifeLine, 'beside'>>> = {
  'mark': event => ({ what: `v${event.number ?? ''} marked known-good`, state: 'in-line', label: 'marked' }),
  'mark-none': () => ({ what: 'known-good taken back', state: 'unmarked', label: 'no known-good' }),
  'void': event => ({ what: `v${event.number ?? ''} set aside as a wrong upload`, state: 'unmarked', label: 'void' }),
  'fitted': event => ({ what: `unit ${event.serial ?? ''} fitted`, state: 'new', label: 'unit fitted' }),
  'finding': () => ({ what: 'a finding was opened', state: 'off', label: 'finding opened' }),
  'finding-closed': () => ({ what: 'the finding was closed', state: 'in-line', label: 'finding closed' }),
  'swap': () => ({ what: 'unit swap', state: 'new', label: 'swap' }),
  'taken-out': event => ({ what: `unit ${event.serial ?? ''} taken out`, state: 'never-read', label: 'unit taken out' }),
}

export function lifeLine(event: LifeEvent): LifeLine {
  return event.kind === 'version' ? versionLine(event) : { ...others[event.kind](event), beside: join([event.by, event.text]) }
}
