import { setupField, setupFieldNames } from '../../shared/settings/fields'
import { moveFieldNames, zoneFieldNames } from '../../shared/settings/move-fields'
import type { EntryTable } from '../../shared/settings/entry-table/schema'
import { type AxisKind, type Content, type SettingsFile, schemaName } from '../../shared/settings/types'

/** The list of an invented drive: semicolons, decimal comma, words as numbers, positions in hundredths, speeds by steps of 5. */
export const liftTable: EntryTable = {
  delimiter: ';', decimal: 'comma', header: ['Backup of drive', 'No.;Parameter;Value;Unit'],
  columns: { number: 1, name: 2, value: 3, unit: 4 },
  parameters: [
    { number: 'P-01', name: 'Serial', field: 'unit:serial' },
    { number: 'P-02', name: 'Firmware', field: 'unit:firmware' },
    { number: 'K-001', name: 'Positive direction', field: 'positiveDirection', words: { extend: '0', retract: '1' } },
    { number: 'K-003', name: 'Soft limit min', field: 'softLimitMin', step: 0.1, digits: 1 },
    { number: 'K-004', name: 'Soft limit max', field: 'softLimitMax', step: 0.1, digits: 1 },
    { number: 'K-012', name: 'Speed limit', field: 'speedLimit', unit: 'm/s', step: 0.005, digits: 3, rounding: 'down' },
    { number: 'K-020', name: 'Window', field: 'inPositionWindow', factor: 0.001, step: 0.01 },
    { number: 'K-031', name: 'Velocity gain', field: 'velocityGain' },
    { number: 'K-040', name: 'Brake', field: 'brakeFitted', words: { true: '1', false: '0' } },
    { number: 'K-050', name: 'Ramp', field: 'extra:Ramp', unit: 'counts' },
  ],
  zones: [{ name: 'Output', field: 'zone' }, { name: 'On from', field: 'from' }, { name: 'On to', field: 'to' }],
  moves: [
    { name: 'Step', field: 'move' }, { name: 'Name', field: 'label' }, { name: 'Mode', field: 'kind', words: { absolute: 'A', relative: 'R', press: 'P' } },
    { name: 'Pos', field: 'target', factor: 0.01 }, { name: 'Vel', field: 'speed' }, { name: 'Acc', field: 'acceleration', unit: 'm/s²' },
    { name: 'Force', field: 'forceLimit', none: '-' }, { name: 'Slow at', field: 'approach', none: '-' }, { name: 'Then', field: 'next', none: '-' },
  ],
}
export const liftPlate = { model: 'LT10-100', axisKind: 'linear' as const, stroke: 200, entryTable: liftTable }

/** The same unit in the neutral form. */
export const liftFile: SettingsFile = {
  schema: schemaName, unit: { serial: 'LT10-26-0001', model: 'LT10-100', firmware: '1.4' }, exportedAt: '2026-11-30T08:15:00+01:00', axisKind: 'linear',
  setup: { positiveDirection: 'retract', softLimitMin: -2.5, softLimitMax: 184.5, speedLimit: 250, inPositionWindow: 0.05, velocityGain: 310.25, brakeFitted: true },
  zones: [{ zone: 1, from: 10, to: 25 }],
  moves: [
    { move: 0, kind: 'absolute', target: 5, speed: 250, acceleration: 2000 },
    { move: 3, label: 'Press', kind: 'press', target: 150.25, speed: 100, acceleration: 2500, forceLimit: 38, approach: 120, next: 0 },
  ],
  extra: { 'Ramp': { value: 3, unit: 'counts' }, 'K-017': 15 }, readings: {},
}

export const liftLines = [
  'Backup of drive', 'No.;Parameter;Value;Unit',
  'P-01;Serial;LT10-26-0001;', 'P-02;Firmware;1.4;',
  'K-001;Positive direction;1;', 'K-003;Soft limit min;-2,5;mm', 'K-004;Soft limit max;184,5;mm', 'K-012;Speed limit;0,250;m/s',
  'K-020;Window;50;mm', 'K-031;Velocity gain;310,25;', 'K-040;Brake;1;', 'K-050;Ramp;3;counts', 'K-017;;15;',
  'Output;On from;On to', '1;10;25',
  'Step;Name;Mode;Pos;Vel;Acc;Force;Slow at;Then', '0;;A;500;250;2;-;-;-', '3;Press;P;15025;100;2,5;38;120;0',
]

/** A table with a row for each field of an axis kind, in canonical units and without steps: it holds every content. */
export function wholeTable(axisKind: AxisKind, layout: Pick<EntryTable, 'delimiter' | 'decimal'>): EntryTable {
  const names = setupFieldNames.filter((name) => {
    const field = setupField(name)
    return field?.type !== 'number' || field.unit[axisKind] !== null
  })
  const parameter = (field: string, index: number) => ({ number: `#${index + 1}`, name: `the ${field}`, field })
  return {
    ...layout, header: ['list'], columns: { number: 2, name: 1, value: 4, unit: 3 },
    parameters: ['unit:serial', 'unit:channel', 'unit:model', 'unit:firmware', 'file:exportedAt', 'file:note', ...names].map(parameter),
    zones: ['zone', ...zoneFieldNames].map(field => ({ name: `Zone ${field}`, field })),
    moves: ['move', ...moveFieldNames].map(field => ({ name: `Move ${field}`, field })),
  }
}

/** A drive that keeps speeds in steps of one size and accelerations in steps of another, whatever the field. */
export function steppedTable(speed: number, acceleration: number): EntryTable {
  const of = (field: string) => /speed/i.test(field) ? { step: speed } : /celeration/.test(field) ? { step: acceleration } : {}
  const { parameters, zones, moves, ...layout } = wholeTable('linear', { delimiter: ';', decimal: 'point' })
  return { ...layout, zones, parameters: parameters.map(entry => ({ ...entry, ...of(entry.field) })), moves: moves.map(entry => ({ ...entry, ...of(entry.field) })) }
}

export const withContent = (file: SettingsFile, { axisKind, setup, zones, moves, extra }: Content): SettingsFile => ({ ...file, axisKind, setup, zones, moves, extra })
