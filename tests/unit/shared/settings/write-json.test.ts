import { describe, expect, it } from 'vitest'
import { exampleFiles, leastExample, pressExample } from '../../../../shared/settings/examples'
import { writeJson } from '../../../../shared/settings/write-json'

describe('writeJson', () => {
  it('writes the least file', () => {
    expect(writeJson(leastExample)).toBe(`{
  "schema": "witnessmark.axis-settings/1",
  "unit": { "serial": "HL25-0005", "model": "HL25-100" },
  "exportedAt": "2026-11-30T10:00:00Z",
  "axisKind": "linear",
  "setup": {},
  "zones": [],
  "moves": [],
  "extra": {},
  "readings": {}
}
`)
  })

  it('is JSON of the very file', () => {
    for (const file of exampleFiles) expect(JSON.parse(writeJson(file))).toEqual(file)
  })

  it('has one row a line, its number first, fields in the order of the screens', () => {
    const lines = writeJson(pressExample).split('\n')
    expect(lines).toContain('    { "move": 3, "label": "let go", "kind": "relative", "target": -10, "speed": 60, "acceleration": 800, "next": 0, "dwell": 150 },')
    expect(lines).toContain('    { "zone": 1, "from": 0, "to": 5 },')
    expect(lines).toContain('    "Ramp": { "value": 3, "unit": "counts" },')
    expect(lines.findIndex(line => line.includes('softLimitMin'))).toBeLessThan(lines.findIndex(line => line.includes('homingMethod')))
  })

  it('escapes what JSON has to', () => {
    const file = { ...leastExample, note: 'a "b"\n\tc\\', extra: { 'q"': '\u2028' } }
    expect(JSON.parse(writeJson(file))).toEqual(file)
  })
})
