import { z } from 'zod'
import { nameplateSchema, type Nameplate } from '#shared/settings/nameplate'
import type { AxisKind } from '#shared/settings/types'
import type { Body, FormField } from '../forms/fields'

type Name = Exclude<keyof Nameplate, 'dictionary' | 'entryTable'>
interface Group { readonly title: string, readonly why: string, readonly fields: Readonly<Partial<Record<Name, string>>> }

/** The fields of a nameplate as people look for them on a data sheet; labels in the words of the trade. */
export const nameplateGroups: readonly Group[] = [
  { title: 'What it is', why: 'These three are needed; all else may wait, and a check that misses a value says which.', fields: { model: 'Model', axisKind: 'Kind', stroke: 'Stroke', hardMargin: 'Room to the hard stop', decimals: 'Decimals shown', firmwareSeen: 'Firmware seen', note: 'Note' } },
  { title: 'Speed', why: 'Moves and limits are held against them.', fields: { maxSpeed: 'Highest speed', maxAcceleration: 'Highest acceleration', maxPressSpeed: 'Highest press speed' } },
  { title: 'Force', why: 'Without the rated thrust nobody knows what a percentage is in newtons.', fields: { ratedThrust: 'Rated thrust or torque', peakThrust: 'Peak thrust or torque', forceBase: '100 % means', pressForceMin: 'Least press force', pressForceMax: 'Highest press force', forceLimitActsBothWays: 'Force limit acts both ways', stopsAtApproach: 'Stops at the approach', maxImpactEnergy: 'Highest impact energy', maxOverloadTime: 'Longest overload' } },
  { title: 'Mechanics', why: 'For thrust, load and stopping.', fields: { lead: 'Lead', gearRatio: 'Gear ratio', efficiency: 'Efficiency', movingMass: 'Moving mass', rotorInertia: 'Inertia of the rotor', maxPayloadLevel: 'Payload when level', maxPayloadVertical: 'Payload when vertical', maxPayloadInertia: 'Payload inertia' } },
  { title: 'Precision', why: 'What a read-back may differ by.', fields: { resolution: 'One count', shownDigit: 'Last digit shown', truncates: 'Cuts digits off', repeatability: 'Repeatability', encoder: 'Encoder', homeOffsetSense: 'Home offset' } },
  { title: 'Moves and inputs', why: 'Which moves the inputs can call.', fields: { maxMoves: 'Moves at most', firstMove: 'First move', allOff: 'All inputs off calls', strobe: 'Start signal', maxSelectInputs: 'Select inputs at most', inputFilterTime: 'Input filter', inputSwitching: 'Inputs', outputSwitching: 'Outputs' } },
  { title: 'Brake', why: 'For axes that can fall.', fields: { brakeFitted: 'Brake fitted', brakeCloseTime: 'Brake closes in', brakeOpenTime: 'Brake opens in', brakeHolding: 'Brake holds' } },
]

interface Property { readonly type?: string, readonly description?: string, readonly enum?: readonly (string | number)[], readonly anyOf?: readonly { readonly const?: string | number }[] }
const { properties, required } = z.toJSONSchema(nameplateSchema) as unknown as { readonly properties: Readonly<Record<string, Property>>, readonly required: readonly string[] }

const units = ['mm or deg', 'mm/s² or deg/s²', 'mm/s or deg/s', 'N or N·m', 'kg·cm²', 'kg', 'ms', 'J', '%'] as const
/** The unit that a description begins with, for that kind of axis. */
export function nameplateUnit(name: Name, kind: AxisKind): string {
  const description = (properties[name]?.description ?? '').replace('± ', '')
  const found = units.find(unit => description.startsWith(unit))
  return found?.split(' or ')[kind === 'linear' ? 0 : 1] ?? found ?? (name === 'lead' ? 'mm' : '')
}

const choiceWords: Readonly<Record<string, string>> = { p: 'p: pulls to plus (PNP)', n: 'n: pulls to 0 V (NPN)' }

/** A description as a sentence: the unit stands at the label already, and what holds when it is left empty is said so. */
function helpOf(description: string | undefined): string | undefined {
  if (description === undefined) return undefined
  const plain = description.replace('± ', '')
  const unit = units.find(each => plain.startsWith(each)) ?? ''
  const rest = plain.slice(unit.length).replace(/^:/, '').replace(/;? ?absent = (.*)$/, (_, value: string) => `. Left empty: ${value.replaceAll('-', ' ')}`).replace(/^\. /, '').trim()
  return rest === '' ? undefined : `${rest.charAt(0).toUpperCase()}${rest.slice(1)}.`
}
const ownHelp: Readonly<Partial<Record<Name, string>>> = { decimals: 'How many the drive shows.', gearRatio: 'Motor turns a turn of the output. Left empty: 1.', efficiency: '0 to 1, of screw and gear together.', lead: 'A turn of the screw.', rotorInertia: 'Motor, coupling and screw together.' }

function fieldOf(name: Name, label: string, kind: AxisKind): FormField {
  const property = properties[name] ?? {}
  const help = ownHelp[name] ?? helpOf(property.description)
  const common = { name, label, needed: required.includes(name), ...(help ? { help } : {}) }
  const choices = property.enum ?? property.anyOf?.flatMap(({ const: value }) => value === undefined ? [] : [value])
  if (choices) return { ...common, type: 'choice', options: choices.map(value => ({ value: String(value), label: choiceWords[String(value)] ?? String(value).replaceAll('-', ' ') })), ...(typeof choices[0] === 'number' ? { as: 'number' as const } : {}) }
  if (property.type === 'boolean') return { ...common, type: 'flag' }
  if (property.type === 'array') return { ...common, type: 'list' }
  if (property.type === 'string') return name === 'note' ? { ...common, type: 'long' } : { ...common, type: 'text', mono: true }
  return { ...common, type: 'number', unit: nameplateUnit(name, kind) }
}

const namesOf = (group: Group) => Object.entries(group.fields) as [Name, string][]
export const fieldsOfGroup = (group: Group, kind: AxisKind): FormField[] => namesOf(group).map(([name, label]) => fieldOf(name, label, kind))
export const nameplateFields = (kind: AxisKind): FormField[] => nameplateGroups.flatMap(group => fieldsOfGroup(group, kind))

/** How many of the values that a nameplate can hold stand on this one. */
export function filled(nameplate: Nameplate): { readonly of: number, readonly count: number } {
  const names = nameplateGroups.flatMap(group => namesOf(group).map(([name]) => name))
  return { of: names.length, count: names.filter(name => nameplate[name] !== undefined).length }
}

/** A number is written as the form holds it; dictionary and entry table stand apart. */
export const nameplateRecord = ({ dictionary: _dictionary, entryTable: _entryTable, ...plain }: Nameplate): Body => plain
