import { describe, expect, it } from 'vitest'
import { withoutReadings } from '../../../../shared/settings/readings'
import type { SettingsFile } from '../../../../shared/settings/types'

const file: SettingsFile = {
  schema: 'witnessmark.axis-settings/1', unit: { serial: 'HL40-25-00914', model: 'HL40-200V' }, exportedAt: '2026-12-01T08:00:00+01:00', axisKind: 'linear',
  setup: {}, zones: [], moves: [], extra: { 'Hours': 8123, 'K-017': 15, 'constructor': 1 }, readings: { operatingHours: 8123 },
}

describe('withoutReadings', () => {
  it('moves what the dictionary calls a reading, and nothing else', () => {
    const settled = withoutReadings(file, { 'Hours': { reading: true }, 'K-017': { reading: false }, 'Other': { reading: true } })
    expect(settled.extra).toEqual({ 'K-017': 15, 'constructor': 1 })
    expect(settled.readings).toEqual({ operatingHours: 8123, Hours: 8123 })
  })
  it('leaves the file itself alone', () => {
    withoutReadings(file, { Hours: { reading: true } })
    expect(file.extra).toHaveProperty('Hours')
  })
  it('hands back the same file where no key is a reading, names of Object.prototype included', () => {
    expect(withoutReadings(file)).toBe(file)
    expect(withoutReadings(file, { 'K-017': { name: 'damping' } })).toBe(file)
  })
  it('changes nothing a second time', () => {
    const dictionary = { Hours: { reading: true } }
    const once = withoutReadings(file, dictionary)
    expect(withoutReadings(once, dictionary)).toBe(once)
  })
})
