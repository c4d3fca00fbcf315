import { describe, expect, it } from 'vitest'
import { readCsv } from '../../../../shared/settings/csv-reader'
import { exampleFiles, pressExample, turntableExample } from '../../../../shared/settings/examples'
import { writeCsv } from '../../../../shared/settings/write-csv'

const head = `section,row,field,value,unit
file,,schema,witnessmark.axis-settings/1,
file,,exportedAt,2026-11-30T08:15:00+01:00,
file,,axisKind,linear,
unit,,serial,A1,
unit,,model,HL40-200V,
`
const told = (text: string) => {
  const outcome = readCsv(text)
  return outcome.ok ? [] : outcome.errors.map(error => `${error.code} ${error.at} ${error.line}:${error.column}`)
}
const setupOf = (lines: string, options = {}) => {
  const outcome = readCsv(head + lines, options)
  return outcome.ok ? outcome.value.content.setup : outcome.errors
}

describe('readCsv', () => {
  it('answers file, content and receipt', () => {
    expect(readCsv(writeCsv(pressExample))).toMatchObject({
      ok: true, value: { file: pressExample, normalised: { form: 'csv', rounded: 0, converted: 0, encoding: 'utf-8', decodedTexts: [], delimiter: ',', decimal: 'point' } },
    })
  })

  it('counts what was converted and what rounding changed', () => {
    const outcome = readCsv(`${head}setup,,softLimitMax,7.5,in\nsetup,,softLimitMin,1,µm\nsetup,,homeOffset,0.01,µm\nsetup,,jogSpeed,5.00,mm/s\n`)
    expect(outcome.ok && outcome.value.normalised).toMatchObject({ converted: 3, rounded: 0 })
    const other = readCsv(`${head}setup,,softLimitMax,0.0005,µm\n`)
    expect(other.ok && other.value.normalised).toMatchObject({ converted: 1, rounded: 1 })
  })

  it('lists the texts that are not ASCII where the file was Windows-1252, each once', () => {
    const outcome = readCsv(`${head}setup,,jerk,1,mm/s³\nextra,,Größe,Müller,text\nmove,0,label,plain,\nmove,0,kind,absolute,\nmove,0,target,0,\nmove,0,speed,1,\nmove,0,acceleration,1,\nextra,,Name,Müller,text\n`, { encoding: 'windows-1252' })
    expect(outcome.ok && outcome.value.normalised.decodedTexts).toEqual(['mm/s³', 'Größe', 'Müller'])
  })
})

describe('layout', () => {
  it('does not mind line ends, blank lines and empty records', () => {
    const text = writeCsv(pressExample)
    for (const end of ['\n', '\r', '\r\n', '\n\n', '\r\n,,,,\r\n', '\n,,,,,,\n']) {
      const outcome = readCsv(text.replaceAll('\r\n', end))
      expect(outcome.ok && outcome.value.file).toEqual(pressExample)
    }
  })

  it('does not mind a missing last line end and missing last commas', () => {
    const text = writeCsv(pressExample)
    expect(readCsv(text.trimEnd())).toMatchObject({ ok: true })
    const cut = readCsv(text.replace(/,\r\n/g, '\r\n'))
    expect(cut.ok && cut.value.file).toEqual(pressExample)
  })

  it('takes semicolons and tabs, with a decimal comma or point', () => {
    for (const file of exampleFiles) {
      for (const delimiter of [';', '\t']) {
        for (const sign of ['.', ',']) {
          const text = writeCsv(file).split('\r\n').map((line) => {
            const [section = '', row = '', field = '', value = '', unit = ''] = line.split(',')
            const number = /^(setup|zone|move|extra|reading)$/.test(section) && /^-?\d+\.\d+$/.test(value) && unit !== 'text'
            return [section, row, field, number ? value.replace('.', sign) : value, unit].join(delimiter)
          }).join('\n')
          const outcome = readCsv(text)
          expect(outcome.ok ? outcome.value.file : outcome.errors).toEqual(file)
        }
      }
    }
  })

  it('counts the cells of each line', () => {
    expect(told(`${head}setup,,jerk\n`)).toEqual(['csv-syntax  7:1'])
    expect(told(`${head}setup\n`)).toEqual(['csv-syntax  7:1'])
    expect(told(`${head}setup,,jerk,1,mm/s³,x\n`)).toEqual(['csv-syntax  7:1'])
    expect(told(`${head}setup,,jerk,1\nsetup,,jogSpeed,1,,,,\n`)).toEqual([])
  })

  it('has lines counted from the first of the file, sep line and cells of several lines included', () => {
    expect(told(`sep=,\n${head}file,,note,"one\ntwo",\nsetup,,jerk,x,\n`)).toEqual(['number-syntax /setup/jerk 10:13'])
    expect(told(`${head}setup,,"jerk","x",\n`)).toEqual(['number-syntax /setup/jerk 7:15'])
    expect(told(`${head}extra,,"a ""b""",5 mm,mm\n`)).toEqual(['number-syntax /extra/a "b" 7:18'])
  })
})

describe('values', () => {
  it('have the canonical unit where none is given', () => {
    expect(setupOf('setup,,softLimitMax,180,\nsetup,,mountingAngle,-90,\nsetup,,thrustLimit,90,\n')).toEqual({ softLimitMax: 180, mountingAngle: -90, thrustLimit: 90 })
  })

  it('are read by the axis kind, wherever it stands', () => {
    const text = `${head.replace('file,,axisKind,linear,\n', '')}setup,,softLimitMax,1,rev\nfile,,axisKind,rotary,\n`
    const outcome = readCsv(text)
    expect(outcome.ok && outcome.value.content.setup).toEqual({ softLimitMax: 360 })
  })

  it('may be empty: not set', () => {
    expect(setupOf('setup,,softLimitMax,,mm\nsetup,,homingMethod,,\nsetup,,brakeFitted,,\n')).toEqual({})
  })

  it('of spreadsheets: flags in capitals', () => {
    expect(setupOf('setup,,brakeFitted,TRUE,\nsetup,,softLimitsActive,FALSE,\n')).toEqual({ brakeFitted: true, softLimitsActive: false })
  })

  it('keep blanks and quotes of texts', () => {
    const file = { ...pressExample, note: ' "quoted", and ; more\n\tnext ', extra: { K: ' x ', L: '"', M: ',' } }
    const outcome = readCsv(writeCsv(file))
    expect(outcome.ok && outcome.value.file).toEqual(file)
  })

  it('of the drive’s own have their type by unit and look', () => {
    const outcome = readCsv(`${head}extra,,A,15,\nextra,,B,15,text\nextra,,C,15,counts\nextra,,D,true,\nextra,,E,true,text\nextra,,F,,\nextra,,G,,counts\nextra,,H,x,\n`)
    expect(outcome.ok && outcome.value.content.extra).toEqual({ A: 15, B: '15', C: { value: 15, unit: 'counts' }, D: true, E: 'true', F: '', H: 'x' })
  })
})

describe('a turntable', () => {
  it('is read in turns of its units', () => {
    const text = writeCsv(turntableExample).replace('zone,1,from,350,deg', 'zone,1,from,-10,deg').replace('setup,,modulo,360,deg', 'setup,,modulo,1,rev').replace('move,0,speed,360,deg/s', 'move,0,speed,60,rpm')
    const outcome = readCsv(text)
    expect(outcome.ok && outcome.value.content).toMatchObject({ setup: { modulo: 360 }, moves: [{ speed: 360 }, {}], zones: [{ from: -10, to: 10 }] })
  })
})
