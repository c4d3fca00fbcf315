import { describe, expect, it } from 'vitest'
import { pressExample } from '../../../../shared/settings/examples'
import { readJson } from '../../../../shared/settings/json-reader'
import { writeJson } from '../../../../shared/settings/write-json'

const first = (text: string) => {
  const outcome = readJson(text)
  if (outcome.ok) throw new Error('the text was read')
  return outcome.errors[0]
}

describe('readJson', () => {
  it('answers file, content and receipt', () => {
    const outcome = readJson(writeJson(pressExample))
    expect(outcome).toMatchObject({ ok: true, value: { file: pressExample, normalised: { form: 'json', rounded: 0, converted: 0, encoding: 'utf-8', decodedTexts: [] } } })
  })

  it('counts what rounding changed', () => {
    const text = writeJson(pressExample).replace('"softLimitMax": 180', '"softLimitMax": 180.00000049').replace('"jogSpeed": 50', '"jogSpeed": 50.00000000')
    const outcome = readJson(text, 'utf-8-bom')
    expect(outcome.ok && outcome.value.normalised).toMatchObject({ rounded: 1, encoding: 'utf-8-bom' })
  })

  it('tells where the text stops making sense', () => {
    expect(first('{\n  "schema": x\n}')).toEqual({ at: '', line: 2, column: 13, code: 'json-syntax', message: 'A value cannot begin with "x".' })
    expect(first('')).toMatchObject({ line: 1, column: 1, message: 'A value is missing: the file ends here. Was it cut short? Export it again.' })
    expect(first('{ "note": "a\u0007" }')).toMatchObject({ column: 13, message: 'Character 7 must be written as an escape inside a text.' })
    expect(first('{ "note": "a')).toMatchObject({ column: 13, message: 'The text is not closed: a quote is missing.' })
    expect(first('{ "note": "C:\\temp\\x" }')).toMatchObject({ message: '"\\x" is no escape; a backslash itself is written \\\\.' })
    expect(first('{ "a": 1, }')).toMatchObject({ message: 'Nothing follows the comma before "}": take the comma out.' })
    expect(first('{ "a": 1 } x')).toMatchObject({ message: 'Nothing may follow the closing sign; "x" does.' })
    expect(first('[ 01 ]')).toMatchObject({ column: 3, message: 'A number does not begin with 0 before other digits.' })
  })

  it('wants an object', () => {
    for (const text of ['[]', '"file"', '5', 'null', 'true']) expect(first(text)).toMatchObject({ at: '', code: 'json-syntax', value: text })
  })

  it('tells the place of a value in characters, not in code units', () => {
    expect(first('{ "😀": 1, "extra": { " K": 1 } }')).toMatchObject({ code: 'missing' })
    const outcome = readJson('{ "note": "😀", "colour": 1 }')
    expect(!outcome.ok && outcome.errors.find(error => error.code === 'key-unknown')).toMatchObject({ line: 1, column: 16 })
  })

  it('shows at most 80 characters of a value', () => {
    const outcome = readJson(writeJson(pressExample).replace('"After the new lid gasket."', `"${'x'.repeat(3000)}"`))
    expect(!outcome.ok && outcome.errors).toMatchObject([{ at: '/note', code: 'text-length', value: `"${'x'.repeat(79)}`, message: '3000 characters; 1 to 2000 are allowed.' }])
  })
})
