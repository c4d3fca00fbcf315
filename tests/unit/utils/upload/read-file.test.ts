import { describe, expect, it } from 'vitest'
import { readFile } from '../../../../utils/upload/read-file'

const csv = (delimiter: string, value: string) => new TextEncoder().encode([
  ['section', 'row', 'field', 'value', 'unit'], ['file', '', 'schema', 'witnessmark.axis-settings/1', ''], ['file', '', 'exportedAt', '2026-11-30T08:15:00+01:00', ''],
  ['file', '', 'axisKind', 'linear', ''], ['unit', '', 'serial', 'S-1', ''], ['unit', '', 'model', 'HL40-200V', ''], ['setup', '', 'softLimitMax', value, 'mm'],
].map(cells => cells.join(delimiter)).join('\n'))

describe('a file that leaves its decimal sign open', () => {
  it('asks, and reads with the sign that is said; the other sign is then refused, not passed over', () => {
    expect(readFile(csv(';', '1.250'))).toMatchObject({ state: 'unreadable', asksSign: true, errors: [{ code: 'number-unclear' }] })
    expect(readFile(csv(';', '1.250'), 'point')).toMatchObject({ content: { setup: { softLimitMax: 1.25 } } })
    expect(readFile(csv(';', '1,250'), 'comma')).toMatchObject({ content: { setup: { softLimitMax: 1.25 } } })
    expect(readFile(csv(';', '1.250'), 'comma')).toMatchObject({ state: 'unreadable', asksSign: false })
  })
  it('does not ask where the answer would not help: a file cut by commas, an error of another kind', () => {
    expect(readFile(csv(',', '"1,250"'))).toMatchObject({ state: 'unreadable', asksSign: false })
    expect(readFile(csv(';', 'wide'))).toMatchObject({ state: 'unreadable', asksSign: false })
  })
})
