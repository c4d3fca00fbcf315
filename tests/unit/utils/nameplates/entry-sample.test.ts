import { describe, expect, it } from 'vitest'
import { draftFromSample } from '../../../../utils/nameplates/entry-sample'
import { judgeEntry } from '../../../../utils/nameplates/entry-table'
import { readEntryFile } from '../../../../shared/settings/entry-table/read-entry'
import { liftLines } from '../../../support/entry-table'

const lines = (...text: string[]) => text.join('\r\n')
const fieldsOf = (text: string, axisKind: 'linear' | 'rotary' = 'linear') => draftFromSample(text, axisKind)?.parameters.map(({ number, field, unit }) => [number, field, unit])

const foreign = lines(
  'Drive 7 backup', 'No;Parameter;Value;Unit',
  '1;Serial number;KT20-26-0003;', '2;Firmware;2.0;', '10;Soft limit min;0,0;mm', '11;Soft limit max;148,50;mm', '12;Speed limit;0,400;m/s', '13;Thrust limit;55,0;%', '77;Fan level;3;',
  'Step;Name;Mode;Pos;Vel;Acc', '0;Back;absolute;4,00;250;2500', '1;Push;absolute;138,00;180;1800',
)

describe('a table from a sample', () => {
  it('sees how the list is cut, its lines above, its columns and its decimal sign', () => {
    expect(draftFromSample(foreign, 'linear')).toMatchObject({ delimiter: ';', decimal: 'comma', header: 'Drive 7 backup\nNo;Parameter;Value;Unit', columns: { number: '1', name: '2', value: '3', unit: '4' } })
    const other = draftFromSample(lines('Par,Value,Unit,Text', 'P1,5.5,mm,Soft limit min'), 'linear')
    expect(other).toMatchObject({ delimiter: ',', decimal: 'point', header: 'Par,Value,Unit,Text', columns: { number: '1', name: '4', value: '2', unit: '3' } })
  })

  it('guesses fields from names, takes units that fit, and keeps the rest as the drive’s own', () => {
    expect(fieldsOf(foreign)).toEqual([
      ['1', 'unit:serial', ''], ['2', 'unit:firmware', ''], ['10', 'softLimitMin', 'mm'], ['11', 'softLimitMax', 'mm'], ['12', 'speedLimit', 'm/s'], ['13', 'thrustLimit', '%'], ['77', 'extra:77', ''],
    ])
    expect(fieldsOf(lines('No;Name;Value;Unit', '1;Speed limit;5;kg', '2;Jog speed;5;rpm', '3;Jog speed;6;rpm'), 'rotary')).toEqual([['1', 'extra:1', ''], ['2', 'jogSpeed', 'rpm'], ['3', 'extra:3', '']])
  })

  it('finds the tables below by their headings', () => {
    const draft = draftFromSample(liftLines.join('\n'), 'linear')
    expect(draft?.zones.map(({ name, field }) => [name, field])).toEqual([['Output', 'zone'], ['On from', 'from'], ['On to', 'to']])
    expect(draft?.moves.map(({ name, field }) => [name, field])).toEqual([
      ['Step', 'move'], ['Name', 'label'], ['Mode', 'kind'], ['Pos', 'target'], ['Vel', 'speed'], ['Acc', 'acceleration'], ['Force', 'forceLimit'], ['Slow at', 'approach'], ['Then', 'next'],
    ])
  })

  it('can be used as it is, and reads its own sample', () => {
    const { table, findings } = judgeEntry(draftFromSample(foreign, 'linear')!, 'linear')
    expect(findings).toEqual([])
    const read = readEntryFile(new TextEncoder().encode(foreign), { model: 'KT20', axisKind: 'linear', ...table && { entryTable: table } }, { exportedAt: '2026-11-30T08:15:00+01:00' })
    expect(read.ok ? read.value.file : read.errors).toMatchObject({
      unit: { serial: 'KT20-26-0003', firmware: '2.0' }, setup: { softLimitMin: 0, softLimitMax: 148.5, speedLimit: 400, thrustLimit: 55 }, extra: { 77: 3 },
      moves: [{ move: 0, label: 'Back', target: 4, speed: 250 }, { move: 1, target: 138, acceleration: 1800 }],
    })
  })

  it('is none of a text without cells', () => expect(draftFromSample('nothing\nto see', 'linear')).toBeUndefined())
})
