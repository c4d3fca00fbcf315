import { describe, expect, it } from 'vitest'
import { readSettingsText } from '../../../../shared/settings/read'
import type { AxisKind, Content } from '../../../../shared/settings/types'
import { unitNames, unitsFor } from '../../../../shared/units/units'

/*
 * Every unit that a CSV file may bring, in a field of its own, as it is then kept. Factors: NIST SP 811 (2008), appendix B.8
 * and B.9 (inch 25.4 mm, pound 0.453 592 37 kg, standard gravity 9.806 65 m/s², pound-force as their product); values worked
 * out from them with 60 digits and rounded once, half to even, to six decimals. 1 rpm is 6 deg/s, 1 rad 180/π deg.
 */

const linear: readonly (readonly [field: string, value: string, unit: string, kept: number])[] = [
  ['softLimitMax', '180', 'mm', 180], ['inPositionWindow', '50', 'µm', 0.05], ['softLimitMax', '12.5', 'cm', 125], ['softLimitMax', '0.18', 'm', 180],
  ['softLimitMax', '7.5', 'in', 190.5], ['softLimitMax', '0.1234567', 'in', 3.1358], ['jogSpeed', '50', 'mm/s', 50], ['jogSpeed', '0.25', 'm/s', 250], ['jogSpeed', '2', 'in/s', 50.8],
  ['accelerationLimit', '4000', 'mm/s²', 4000], ['accelerationLimit', '4', 'm/s²', 4000], ['accelerationLimit', '100', 'in/s²', 2540], ['accelerationLimit', '0.5', 'g', 4903.325],
  ['jerk', '50000', 'mm/s³', 50000], ['frictionForce', '25', 'N', 25], ['frictionForce', '0.025', 'kN', 25], ['frictionForce', '5', 'lbf', 22.241108], ['frictionForce', '2.5', 'kgf', 24.516625],
  ['payloadMass', '4.2', 'kg', 4.2], ['payloadMass', '4200', 'g', 4.2], ['payloadMass', '10', 'lb', 4.535924],
  ['thrustLimit', '90', '%', 90], ['thrustLimit', '900', '‰', 90], ['overloadTime', '500', 'ms', 500], ['overloadTime', '0.5', 's', 500], ['inPositionTime', '250', 'µs', 0.25],
  ['notchFrequency', '420', 'Hz', 420], ['notchFrequency', '0.42', 'kHz', 420], ['positionGain', '45', '1/s', 45], ['mountingAngle', '-0.25', 'rev', -90],
]

const rotary: readonly (readonly [field: string, value: string, unit: string, kept: number])[] = [
  ['softLimitMax', '90', 'deg', 90], ['softLimitMax', '0.25', 'rev', 90], ['softLimitMax', '1', 'rad', 57.29578], ['softLimitMax', '-3.14159265', 'rad', -180],
  ['speedLimit', '720', 'deg/s', 720], ['speedLimit', '120', 'rpm', 720], ['speedLimit', '2', 'rad/s', 114.591559],
  ['accelerationLimit', '3600', 'deg/s²', 3600], ['accelerationLimit', '10', 'rad/s²', 572.957795], ['jerk', '900', 'deg/s³', 900],
  ['unbalanceTorque', '0.8', 'N·m', 0.8], ['unbalanceTorque', '10', 'kgf·cm', 0.980665], ['frictionTorque', '1', 'lbf·in', 0.112985], ['frictionTorque', '1', 'lbf·ft', 1.355818],
  ['payloadInertia', '145.2', 'kg·cm²', 145.2], ['payloadInertia', '0.0015', 'kg·m²', 15], ['payloadInertia', '1500', 'kg·mm²', 15], ['payloadInertia', '145200', 'g·cm²', 145.2],
]

function read(axisKind: AxisKind, ...lines: string[]) {
  return readSettingsText([
    'section,row,field,value,unit', 'file,,schema,witnessmark.axis-settings/1,', 'file,,exportedAt,2026-11-30T08:15:00Z,', `file,,axisKind,${axisKind},`, 'unit,,serial,A1,', 'unit,,model,HL40-200V,', ...lines, '',
  ].join('\n'))
}

function contentOf(axisKind: AxisKind, ...lines: string[]): Content {
  const outcome = read(axisKind, ...lines)
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return outcome.value.content
}

describe('a setup value in a unit of its own', () => {
  it.each(linear)('%s of %s %s is %d on a linear axis', (field, value, unit, kept) => {
    expect(contentOf('linear', `setup,,${field},${value},${unit}`).setup).toEqual({ [field]: kept })
  })

  it.each(rotary)('%s of %s %s is %d on a rotary axis', (field, value, unit, kept) => {
    expect(contentOf('rotary', `setup,,${field},${value},${unit}`).setup).toEqual({ [field]: kept })
  })

  it('is held for every unit that is read', () => {
    expect(new Set([...linear, ...rotary].map(([, , unit]) => unit))).toEqual(new Set(unitNames()))
  })
})

describe('rows in units of their own', () => {
  it('are read field by field', () => {
    const { moves, zones } = contentOf('linear', 'zone,1,from,1,in', 'zone,1,to,5,cm', 'move,0,kind,press,', 'move,0,target,6.5,in', 'move,0,speed,0.1,m/s', 'move,0,acceleration,0.1,g',
      'move,0,deceleration,40,in/s2', 'move,0,forceLimit,380,‰', 'move,0,approach,0.15,m', 'move,0,pressSpeed,0.5,in/s', 'move,0,window,20,um', 'move,0,next,1,', 'move,0,dwell,0.15,s',
      'move,1,kind,relative,', 'move,1,target,-0.5,in', 'move,1,speed,10,in/s', 'move,1,acceleration,2,m/s^2')
    expect(zones).toEqual([{ zone: 1, from: 25.4, to: 50 }])
    expect(moves).toEqual([
      { move: 0, kind: 'press', target: 165.1, speed: 100, acceleration: 980.665, deceleration: 1016, forceLimit: 38, approach: 150, pressSpeed: 12.7, window: 0.02, next: 1, dwell: 150 },
      { move: 1, kind: 'relative', target: -12.7, speed: 254, acceleration: 2000 },
    ])
  })

  it('of a turntable are turns, revolutions a minute and radians', () => {
    const { moves, zones } = contentOf('rotary', 'setup,,modulo,1,rev', 'zone,1,from,0.9,rev', 'zone,1,to,10,°', 'move,0,kind,absolute,', 'move,0,target,0.125,rev', 'move,0,turn,shortest,', 'move,0,speed,60,rpm', 'move,0,acceleration,10,rad/s²', 'move,0,window,0.01,rad')
    expect(zones).toEqual([{ zone: 1, from: 324, to: 10 }])
    expect(moves).toEqual([{ move: 0, kind: 'absolute', target: 45, turn: 'shortest', speed: 360, acceleration: 572.957795, window: 0.572958 }])
  })

  it('count for the receipt: what was converted, and what lost digits', () => {
    const outcome = read('linear', 'setup,,softLimitMax,7.5,in', 'setup,,softLimitMin,0.1234567,in', 'setup,,jogSpeed,50,mm/s', 'setup,,jerk,1.0000001,mm/s³')
    expect(outcome.ok && outcome.value.normalised).toMatchObject({ converted: 2, rounded: 2 })
  })
})

describe('a unit in another place', () => {
  it.each(unitNames().filter(name => !unitsFor('mm').some(unit => unit.name === name)))('%s is no unit of a length', (name) => {
    const outcome = read('linear', `setup,,softLimitMax,5,${name}`)
    expect(outcome.ok ? [] : outcome.errors.map(error => error.code)).toEqual(['unit-unfit'])
  })
})
