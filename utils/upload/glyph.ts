import type { Level } from '#shared/checks/types'
import type { FieldChange } from '#shared/diff/types'
import type { Weight } from '#shared/settings/types'
import { stripWords, worstWeight, type StripState } from '../strip-words'
import type { Placed, Reading } from './model'

export interface Glyph { readonly state: StripState, readonly weight?: Weight, readonly sense?: 'more' | 'less', readonly label: string }

export function countsOf(changes: readonly FieldChange[]): Record<Weight, number> {
  const counts = { harm: 0, motion: 0, text: 0 }
  for (const { weight } of changes) counts[weight] += 1
  return counts
}

/** Which way the first numeric change of the worst weight went. */
function senseOf(changes: readonly FieldChange[], weight: Weight | undefined): 'more' | 'less' {
  const delta = changes.find(change => change.weight === weight && change.delta !== undefined)?.delta
  return delta !== undefined && delta < 0 ? 'less' : 'more'
}

function placedGlyph(reading: Placed): Glyph {
  if (reading.identical) return { state: 'in-line', label: 'identical' }
  if (reading.sameAsKnownGood) return { state: 'in-line', label: `the same as known-good v${reading.knownGood?.number ?? ''}` }
  if (!reading.base) return { state: 'new', label: 'the first upload of this axis' }
  const counts = countsOf(reading.changes)
  const weight = worstWeight(counts)
  return { state: 'off', ...(weight ? { weight } : {}), sense: senseOf(reading.changes, weight), label: stripWords('off', counts) }
}

/** The strip of a file: known before above, what the file holds below. */
export function glyphOf(reading: Reading): Glyph {
  switch (reading.state) {
    case 'placed': return placedGlyph(reading)
    case 'unreadable': return { state: 'never-read', label: 'not readable' }
    case 'twin': return { state: 'never-read', label: 'not sent' }
    case 'waits': return { state: 'unmarked', label: 'being read' }
    default: return { state: 'unmarked', label: reading.state === 'unplaced' ? 'axis not known' : 'not judged here' }
  }
}

/** The worst level among the checks of a file, with how many there are of it; notes stay folded. */
export function worstLevel(reading: Reading): { readonly level: Level, readonly count: number } | null {
  if (reading.state === 'unplaced') return { level: 'unknown', count: 1 }
  if (reading.state !== 'placed' || reading.identical) return null
  for (const level of ['stop', 'warn'] as const) {
    const count = reading.checks.filter(check => check.level === level).length
    if (count > 0) return { level, count }
  }
  return null
}

/** “home offset alone” says more than a count where nothing else differs. */
export function changesInWords(reading: Reading): string | null {
  if (reading.state === 'unplaced') return 'nothing to compare'
  if (reading.state !== 'placed') return ''
  if (!reading.base) return 'the first'
  if (reading.changes.length === 0) return 'nothing'
  return reading.changes.every(change => change.field === 'homeOffset') ? 'home offset alone' : null
}
