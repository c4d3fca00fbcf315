import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { contentOf } from '../../../../shared/settings/content'
import { exampleFiles, pressExample, turntableExample } from '../../../../shared/settings/examples'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { hashesOf } from '../../../../shared/settings/hash'

const sha256 = (bytes: Uint8Array) => new Uint8Array(createHash('sha256').update(bytes).digest())

describe('the example files', () => {
  it('show every group of the setup and every kind of move', () => {
    const shown = new Set(exampleFiles.flatMap(file => Object.keys(file.setup)))
    expect(new Set(setupFieldNames.filter(name => shown.has(name)).map(name => setupFields[name].group))).toEqual(new Set(['travel', 'homing', 'motion', 'force', 'load', 'tuning', 'io', 'bus']))
    expect(new Set(exampleFiles.flatMap(file => file.moves.map(move => move.kind)))).toEqual(new Set(['absolute', 'relative', 'press']))
  })

  it('are of both axis kinds, one of them wrapping', () => {
    expect(pressExample.axisKind).toBe('linear')
    expect(turntableExample).toMatchObject({ axisKind: 'rotary', setup: { modulo: 360 } })
  })

  it('have scribe codes of their own', () => {
    const codes = exampleFiles.map(file => hashesOf(contentOf(file), sha256).scribeCode)
    expect(new Set(codes).size).toBe(exampleFiles.length)
  })
})
