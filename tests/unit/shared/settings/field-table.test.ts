import { describe, expect, it } from 'vitest'
import { setupField, setupFieldNames, type SetupFieldName } from '../../../../shared/settings/fields'
import { readSettingsText } from '../../../../shared/settings/read'
import type { AxisKind, Carry, Weight } from '../../../../shared/settings/types'

/*
 * The setup fields of format 1, written down a second time by hand: what a plant's files, watch lists and restore sheets go
 * by. A field that changes its unit, weight, range or carry under the same schema name would make two versions of one file
 * mean two things, so a change has to be made here on purpose as well. CiA 402 object numbers by index, as in the object
 * dictionary of CiA 402 (IEC 61800-7-201).
 */

interface Line {
  readonly name: SetupFieldName
  /** Linear and rotary unit; – for an axis kind that does not have the field. */
  readonly unit: string
  readonly range: string
  readonly weight: Weight
  readonly watched: boolean
  readonly carry: Carry
  readonly cia402: string
}

const table: readonly Line[] = `
  positiveDirection     |            | extend retract, clockwise counterclockwise | harm   | watched | place | 607Eh
  softLimitsActive      |            | true false                                 | harm   | watched | copy  |
  softLimitMin          | mm, deg    |                                            | harm   | watched | place | 607Dh
  softLimitMax          | mm, deg    |                                            | harm   | watched | place | 607Dh
  homeOffset            | mm, deg    |                                            | harm   | watched | prove | 607Ch
  modulo                | –, deg     | above 0                                    | harm   | watched | copy  | 607Bh
  homingMethod          |            | hard-stop limit-switch home-switch index-pulse current-position absolute-encoder | harm | watched | copy | 6098h
  homingDirection       |            | negative positive                          | harm   | watched | copy  | 6098h
  homingSpeed           | mm/s, deg/s   | from 0                                  | harm   | watched | copy  | 6099h
  homingCreepSpeed      | mm/s, deg/s   | from 0                                  | harm   | watched | copy  | 6099h
  homingAcceleration    | mm/s², deg/s² | from 0                                  | motion |         | copy  | 609Ah
  homingForceLimit      | %, %          | from 0                                  | harm   | watched | copy  |
  speedLimit            | mm/s, deg/s   | from 0                                  | harm   | watched | copy  | 607Fh
  accelerationLimit     | mm/s², deg/s² | from 0                                  | harm   | watched | copy  | 60C5h
  decelerationLimit     | mm/s², deg/s² | from 0                                  | harm   | watched | copy  | 60C6h
  quickStopDeceleration | mm/s², deg/s² | from 0                                  | harm   | watched | copy  | 6085h
  jogSpeed              | mm/s, deg/s   | from 0                                  | harm   | watched | copy  |
  pressSpeed            | mm/s, deg/s   | from 0                                  | harm   | watched | copy  |
  jerk                  | mm/s³, deg/s³ | from 0                                  | motion |         | copy  | 60A4h
  smoothingTime         | ms, ms        | from 0                                  | motion |         | copy  |
  inPositionWindow      | mm, deg       | from 0                                  | motion | watched | copy  | 6067h
  inPositionTime        | ms, ms        | from 0                                  | motion | watched | copy  | 6068h
  followingErrorWindow  | mm, deg       | from 0                                  | harm   | watched | copy  | 6065h
  followingErrorTime    | ms, ms        | from 0                                  | harm   | watched | copy  | 6066h
  thrustLimit           | %, %          | from 0                                  | harm   | watched | copy  | 6072h
  thrustLimitPositive   | %, %          | from 0                                  | harm   | watched | copy  | 60E0h
  thrustLimitNegative   | %, %          | from 0                                  | harm   | watched | copy  | 60E1h
  overloadLevel         | %, %          | from 0                                  | harm   | watched | copy  |
  overloadTime          | ms, ms        | from 0                                  | harm   | watched | copy  |
  payloadMass           | kg, –         | from 0                                  | harm   | watched | copy  |
  payloadInertia        | –, kg·cm²     | from 0                                  | harm   | watched | copy  |
  mountingAngle         | deg, deg      | from -90 to 90                          | harm   | watched | place |
  unbalanceTorque       | –, N·m        | from 0                                  | harm   | watched | place |
  frictionForce         | N, –          | from 0                                  | motion |         | prove |
  frictionTorque        | –, N·m        | from 0                                  | motion |         | prove |
  positionGain          | 1/s, 1/s      | from 0                                  | motion | watched | prove | 60FBh
  velocityGain          | ,             |                                         | motion | watched | prove | 60F9h
  velocityIntegralTime  | ms, ms        | from 0                                  | motion | watched | prove | 60F9h
  velocityFeedForward   | %, %          | from 0                                  | motion | watched | prove |
  inertiaRatio          | %, %          | from 0                                  | motion | watched | prove |
  notchFrequency        | Hz, Hz        | from 0                                  | motion | watched | prove |
  inputSwitching        |               | p n                                     | harm   | watched | place |
  outputSwitching       |               | p n                                     | harm   | watched | place |
  selectInputs          | ,             | whole from 0 to 10                      | harm   | watched | place |
  selectSettleTime      | ms, ms        | from 0                                  | harm   | watched | copy  |
  startPulseTime        | ms, ms        | from 0                                  | harm   | watched | copy  |
  onEnableLoss          |               | stop-and-hold stop-and-release release  | harm   | watched | copy  | 605Ah, 605Ch
  brakeFitted           |               | true false                              | harm   | watched | copy  |
  brakeReleaseDelay     | ms, ms        | from 0                                  | harm   | watched | copy  |
  brakeEngageDelay      | ms, ms        | from 0                                  | harm   | watched | copy  |
  nodeAddress           | ,             | whole from 0 to 65535                   | harm   | watched | place |
`.trim().split('\n').map(lineOf)

function lineOf(text: string): Line {
  const [name = '', unit = '', range = '', weight = '', watched = '', carry = '', cia402 = ''] = text.split('|').map(cell => cell.trim())
  return { name: name as SetupFieldName, unit, range, weight: weight as Weight, watched: watched === 'watched', carry: carry as Carry, cia402 }
}

const isNumber = (line: Line) => line.unit !== ''
const unitsOf = (line: Line) => line.unit.split(',').map(each => each.trim())
const kindsOf = (line: Line): AxisKind[] => (['linear', 'rotary'] as const).filter((_, index) => !isNumber(line) || unitsOf(line)[index] !== '–')
const bound = (line: Line, word: 'from' | 'to' | 'above') => new RegExp(`\\b${word} (-?\\d+)`).exec(line.range)?.[1]

/** What a file with this one value says of it: its codes, or the value as it is then kept. */
function fate(line: Line, kind: AxisKind, value: unknown): unknown {
  const file = { schema: 'witnessmark.axis-settings/1', unit: { serial: 'A1', model: 'HL40-200V' }, exportedAt: '2026-11-30T08:15:00Z', axisKind: kind, setup: { [line.name]: value } }
  const outcome = readSettingsText(JSON.stringify(file))
  return outcome.ok ? outcome.value.content.setup[line.name] : outcome.errors.map(error => error.code).join()
}

describe('the setup fields of format 1', () => {
  it('are these and no others, in this order', () => {
    expect(setupFieldNames).toEqual(table.map(line => line.name))
  })

  it.each(table)('$name weighs $weight, carries by $carry, and is watched: $watched', (line) => {
    expect(setupField(line.name)).toMatchObject({ weight: line.weight, watched: line.watched, carry: line.carry })
  })

  it.each(table.filter(line => line.cia402 !== ''))('$name is $cia402 of CiA 402', (line) => {
    expect(setupField(line.name)?.cia402).toContain(line.cia402)
  })

  it('name no object of CiA 402 that is not written here', () => {
    expect(setupFieldNames.filter(name => setupField(name)?.cia402 !== undefined)).toEqual(table.filter(line => line.cia402 !== '').map(line => line.name))
  })

  it.each(table.filter(isNumber))('$name is kept in $unit', (line) => {
    const [linear, rotary] = unitsOf(line).map(unit => unit === '–' ? null : unit)
    expect(setupField(line.name)).toMatchObject({ type: 'number', unit: { linear, rotary } })
  })
})

describe('what a file may say', () => {
  it.each(table.filter(line => bound(line, 'from') !== undefined))('$name: $range, the bounds included', (line) => {
    const step = line.range.startsWith('whole') ? 1 : 0.000001
    for (const kind of kindsOf(line)) {
      for (const [word, beyond] of [['from', -step], ['to', step]] as const) {
        const edge = bound(line, word)
        if (edge === undefined) continue
        expect(fate(line, kind, Number(edge))).toBe(Number(edge))
        expect(fate(line, kind, Number(edge) + beyond)).toBe('number-range')
      }
    }
  })

  it.each(table.filter(line => line.range.startsWith('whole')))('$name is a whole number', (line) => {
    for (const value of [0.5, 1.000001]) expect(fate(line, 'linear', value)).toBe('number-range')
  })

  it.each(table.filter(line => isNumber(line) && line.range === '' && line.name !== 'velocityGain'))('$name may be below 0, and as far as numbers go', (line) => {
    for (const value of [-1e9, -0.000001, 1e9]) expect(fate(line, 'linear', value)).toBe(value)
    expect(fate(line, 'linear', 1000000000.000001)).toBe('number-range')
  })

  it.each(table.filter(line => !isNumber(line)))('$name: $range, and nothing else', (line) => {
    const [linear = '', rotary = linear] = line.range.split(', ')
    for (const [kind, words] of [['linear', linear], ['rotary', rotary]] as const) {
      for (const word of words.split(' ')) {
        const value = line.range === 'true false' ? word === 'true' : word
        expect(fate(line, kind, value)).toBe(value)
        if (value === word) expect(fate(line, kind, word.toUpperCase())).toBe('enum')
      }
      expect(fate(line, kind, 1)).toBe('enum')
    }
  })

  it.each(table.filter(line => line.unit.includes('–')))('$name only on the axis kind that it is for: $unit', (line) => {
    for (const kind of ['linear', 'rotary'] as const) expect(fate(line, kind, 5)).toBe(kindsOf(line).includes(kind) ? 5 : 'not-allowed-here')
  })

  it('a modulo, only above 0: an axis that wraps at nothing has no position', () => {
    const modulo = table.find(line => line.name === 'modulo') as Line
    expect(bound(modulo, 'above')).toBe('0')
    expect([0, -360, 0.000001, 360].map(value => fate(modulo, 'rotary', value))).toEqual(['number-range', 'number-range', 0.000001, 360])
  })

  it('a velocity gain of any size and sign, since the number is the drive’s own', () => {
    const gain = table.find(line => line.name === 'velocityGain') as Line
    for (const value of [-5, 0, 1e-12, 1e30, 0.1234567890123]) expect(fate(gain, 'linear', value)).toBe(value)
  })

  it('nothing at all of any field', () => {
    for (const line of table) for (const value of [null, '']) expect(fate(line, 'linear', value)).toBeUndefined()
  })
})
