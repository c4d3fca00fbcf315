import { describe, expect, it } from 'vitest'
import { readFile } from '../../../../utils/upload/read-file'
import { liftFile, liftLines, liftPlate } from '../../../support/entry-table'

const csv = (delimiter: string, value: string) => new TextEncoder().encode([
  ['section', 'row', 'field', 'value', 'unit'], ['file', '', 'schema', 'witnessmark.axis-settings/1', ''], ['file', '', 'exportedAt', '2026-11-30T08:15:00+01:00', ''],
  ['file', '', 'axisKind', 'linear', ''], ['unit', '', 'serial', 'S-1', ''], ['unit', '', 'model', 'HL40-200V', ''], ['setup', '', 'softLimitMax', value, 'mm'],
].map(cells => cells.join(delimiter)).join('\n'))

const name = 'values.csv'
const read = (bytes: Uint8Array, decimal?: 'point' | 'comma') => readFile({ name, bytes, ...(decimal ? { decimal } : {}) })

describe('a file that leaves its decimal sign open', () => {
  it('asks, and reads with the sign that is said; the other sign is then refused, not passed over', () => {
    expect(read(csv(';', '1.250'))).toMatchObject({ state: 'unreadable', asksSign: true, errors: [{ code: 'number-unclear' }] })
    expect(read(csv(';', '1.250'), 'point')).toMatchObject({ content: { setup: { softLimitMax: 1.25 } } })
    expect(read(csv(';', '1,250'), 'comma')).toMatchObject({ content: { setup: { softLimitMax: 1.25 } } })
    expect(read(csv(';', '1.250'), 'comma')).toMatchObject({ state: 'unreadable', asksSign: false })
  })
  it('does not ask where the answer would not help: a file cut by commas, an error of another kind', () => {
    expect(read(csv(',', '"1,250"'))).toMatchObject({ state: 'unreadable', asksSign: false })
    expect(read(csv(';', 'wide'))).toMatchObject({ state: 'unreadable', asksSign: false })
  })
})

describe('a drive’s own list', () => {
  const list = new TextEncoder().encode(liftLines.join('\n'))
  const layout = { plate: liftPlate, capturedAt: '2026-11-30T08:15:00+01:00' }
  it('asks by which model it is laid out, and is read by that one', () => {
    expect(readFile({ name, bytes: list })).toMatchObject({ state: 'unreadable', asksLayout: true })
    expect(readFile({ name, bytes: list, layout })).toMatchObject({ file: liftFile })
  })
  it('asks as well where its first sign is that of JSON, and not of a file named .json, which is taken at its word', () => {
    const begun = (text: string) => new TextEncoder().encode(text)
    expect(readFile({ name, bytes: begun('[Backup of drive]\nNo.;Value') })).toMatchObject({ asksLayout: true, errors: [{ code: 'json-syntax' }] })
    expect(readFile({ name: 'LID-02.Z.json', bytes: begun('{ "schema": ') })).toMatchObject({ asksLayout: false, errors: [{ code: 'json-syntax' }] })
  })
  it('asks again where it does not fit, and not of a file with other faults', () => {
    expect(readFile({ name, bytes: csv(',', '1'), layout })).toMatchObject({ state: 'unreadable', asksLayout: true, errors: [{ code: 'header' }] })
    expect(readFile({ name, bytes: csv(';', 'wide') })).toMatchObject({ state: 'unreadable', asksLayout: false })
  })
})
