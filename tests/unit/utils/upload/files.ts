import type { FieldChange } from '../../../../shared/diff/types'
import type { CheckResult, Level } from '../../../../shared/checks/types'
import type { Weight } from '../../../../shared/settings/types'
import type { ListedFile, Placed, Reading } from '../../../../utils/upload/model'

/* Builders: say what matters for a case, the rest is the same dull file. */

export const read: Placed['read'] = {
  file: {
    schema: 'witnessmark.axis-settings/1', unit: { serial: 'HL40-25-00914', model: 'HL40-200V' }, exportedAt: '2026-12-01T08:00:00+01:00',
    axisKind: 'linear', setup: {}, zones: [], moves: [], extra: {}, readings: {},
  },
  content: { axisKind: 'linear', setup: {}, zones: [], moves: [], extra: {} },
  normalised: { form: 'json', rounded: 0, converted: 0, encoding: 'utf-8', decodedTexts: [] },
}

export const change = (weight: Weight, watched = weight === 'harm', field = 'thrustLimit'): FieldChange =>
  ({ at: `/setup/${field}`, section: 'setup', field, before: 40, after: 44, unit: '%', delta: 4, weight, watched })

export const check = (level: Level, message = 'says something'): CheckResult => ({ rule: 'travel-placed', level, at: [], message, values: {} })

export const placed = (tag: string, over: Partial<Placed> = {}): Placed => ({
  state: 'placed', read, axis: { id: 1, tag, role: 'lower' }, number: 9, base: { number: 8, versionId: 80, name: null },
  knownGood: { versionId: 70, number: 7, firmware: null, content: { axisKind: 'linear', setup: {}, zones: [], moves: [], extra: {} } }, sameAsKnownGood: false,
  sightings: 0, late: false, clockAhead: false, identical: false, changes: [], renumbered: [], checks: [], ...over,
})

let lastId = 0
export const listed = (reading: Reading, name = 'a.json'): ListedFile => ({ id: lastId += 1, name, bytes: new Uint8Array(), reading })
