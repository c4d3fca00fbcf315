import { parseLeaf, type Entry } from '#shared/trail/entry'
import { logQueries } from '../log/queries'
import type { VaultDb } from '../prepared'

type Kind = Entry['subject']['kind']

/** What an entry about a subject may change in the rows of axes: nothing, those of the axis that it names, or whose nobody can tell. */
const touches: Readonly<Record<Kind, 'none' | 'itself' | 'its axis' | 'any'>> = {
  'axis': 'itself',
  'fitting': 'its axis', 'version': 'its axis', 'sighting': 'its axis', 'known-good': 'its axis', 'waiver': 'its axis', 'label-print': 'its axis', 'swap': 'its axis',
  'vault': 'none', 'setting': 'none', 'token': 'none', 'upload': 'none', 'content': 'none', 'tray': 'none', 'tray-settled': 'none', 'kit': 'none', 'letter': 'none', 'letter-choice': 'none', 'watch': 'none',
  'finding': 'none', 'finding-version': 'none', 'finding-act': 'none', 'planned-change': 'none', 'report': 'none', 'checkpoint': 'none', 'verification': 'none', 'rule': 'none',
  'person': 'any', 'site': 'any', 'line': 'any', 'machine': 'any', 'unit': 'any', 'nameplate': 'any', 'version-void': 'any', 'check-set': 'any', 'attachment': 'any', 'swap-step': 'any', 'read-back': 'any', 'firmware-gap': 'any',
}

/** More entries than this are not looked through: reading all rows anew is as fast. */
const mostEntries = 2000

/** The axes whose rows may have changed since an entry; null where that cannot be told, or were too many. */
export function touchedSince(db: VaultDb, logSeq: number, newest: number): ReadonlySet<number> | null {
  if (newest - logSeq > mostEntries || newest < logSeq) return null
  const touched = new Set<number>()
  for (const { leaf } of logQueries(db).from.all({ seq: logSeq + 1, limit: mostEntries })) {
    const { subject, state } = parseLeaf(leaf)
    const how = touches[subject.kind]
    const axisId = how === 'itself' ? subject.id : state.axisId
    if (how === 'any' || (how !== 'none' && typeof axisId !== 'number')) return null
    if (how !== 'none') touched.add(axisId as number)
  }
  return touched
}
