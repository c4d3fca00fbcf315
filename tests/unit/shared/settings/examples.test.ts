import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { contentOf } from '../../../../shared/settings/content'
import { exampleFiles, pressExample, turntableExample } from '../../../../shared/settings/examples'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { hashesOf } from '../../../../shared/settings/hash'
import { readSettingsText } from '../../../../shared/settings/read'
import { writeCsv } from '../../../../shared/settings/write-csv'
import { writeJson } from '../../../../shared/settings/write-json'

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

  /* Worked out outside this code: keys sorted, JSON written, SHA-256 and base 32 taken by a script of a few lines in another language. */
  it('have the hashes that the page about the format shows', () => {
    expect(exampleFiles.map(file => hashesOf(contentOf(file), sha256)).map(({ contentHash, scribeCode }) => [contentHash, scribeCode])).toEqual([
      ['e7ebc8a72a7aa9a22c0a1c8c054ae7c01a4b5cf5802af9c376d99a65850885fc', 'MQEHT-HEAAM'],
      ['07886e282604c14e2c7b0868749a99b0e28a6cc159667442dca2bd3db241a705', 'GV9P6-BA69C'],
      ['c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f', 'RKK20-GSKBY'],
    ])
  })

  it('are read back from both forms, as they are written', () => {
    for (const file of exampleFiles) {
      for (const text of [writeJson(file), writeCsv(file)]) {
        const outcome = readSettingsText(text)
        expect(outcome.ok && outcome.value).toMatchObject({ file, normalised: { rounded: 0, converted: 0 } })
      }
    }
  })
})
