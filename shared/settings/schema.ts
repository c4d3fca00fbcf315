import { z } from 'zod'
import { type SetupField, setupFieldNames, setupFields } from './fields'
import { type MoveFieldName, type RowField, moveFieldNames, moveFields, zoneFieldNames, zoneFields } from './move-fields'
import { axisKinds, moveKinds, schemaName, turns } from './types'
import { largestNumber } from '../units/number'
import { maxExtra, maxReadings } from './read-extra'
import { maxChannel } from './read-file'
import { maxMoves, maxZones } from './read-rows'
import { type TextRule, textRules } from './text-rules'

/*
 * The input shape of the JSON form, as it is published. What a schema cannot say (which fields a rotary axis has, what a press
 * needs, digits, NFC, rows used once) the reader judges. A file that is read fits the schema, unless only rounding brings a
 * number into its range; not the other way round.
 */

const unset = z.literal('').describe('Not set.')
const optional = <Schema extends z.ZodType>(schema: Schema) => z.union([schema, z.null(), unset]).optional()
const described = <Schema extends z.ZodType>(schema: Schema, help: string, unit?: string) => schema.describe(unit ? `${help} Unit: ${unit}.` : help)

const number = z.number().min(-largestNumber).max(largestNumber)
const text = ({ min, max, pattern }: TextRule) => pattern ? z.string().min(min).max(max).regex(pattern) : z.string().min(min).max(max)
const whole = (min: number, max: number) => z.int().min(min).max(max)
const ownNumber = z.number()

function unitsOf(unit: { readonly linear: string | null, readonly rotary: string | null }): string {
  const { linear, rotary } = unit
  return linear === rotary ? linear ?? '' : [linear && `${linear} (linear)`, rotary && `${rotary} (rotary)`].filter(Boolean).join(', ')
}

function setupSchema(field: SetupField): z.ZodType {
  if (field.type === 'flag') return optional(described(z.boolean(), field.help))
  if (field.type === 'choice') return optional(described(z.enum([...new Set([...field.choices.linear, ...field.choices.rotary])]), field.help))
  if (field.whole) return optional(described(whole(field.min ?? 0, field.max ?? 0), field.help))
  if (field.driveOwn) return optional(described(ownNumber, field.help))
  const low = field.above === undefined ? number.min(field.min ?? -largestNumber) : number.gt(field.above)
  return optional(described(low.max(field.max ?? largestNumber), field.help, unitsOf(field.unit)))
}

const choices: Partial<Record<MoveFieldName, readonly string[]>> = { kind: moveKinds, turn: turns }
const notNegative: readonly MoveFieldName[] = ['speed', 'acceleration', 'deceleration', 'forceLimit', 'pressSpeed', 'window', 'dwell']

function moveSchema(name: MoveFieldName): z.ZodType {
  const field: RowField = moveFields[name]
  const schema = described(bareMoveSchema(name, field), field.help, field.unit && unitsOf(field.unit))
  return field.needed ? schema : optional(schema)
}

function bareMoveSchema(name: MoveFieldName, field: RowField): z.ZodType {
  if (field.type === 'choice') return z.enum(choices[name] ?? [])
  if (field.type === 'text') return text(name === 'label' ? textRules.label : textRules.comment)
  if (field.type === 'row') return whole(0, maxMoves - 1)
  return notNegative.includes(name) ? number.min(0) : number
}

const extraValue = z.union([
  ownNumber, z.boolean(), text(textRules.extraText), z.strictObject({ value: ownNumber, unit: text(textRules.extraUnit) }), z.null(),
])
const extraKey = text(textRules.extraKey)
const shape = <Name extends string>(names: readonly Name[], schemaOf: (name: Name) => z.ZodType) =>
  Object.fromEntries(names.map(name => [name, schemaOf(name)]))

const moveRow = z.strictObject({ move: whole(0, maxMoves - 1).describe('The number that the controller calls.'), ...shape(moveFieldNames, moveSchema) })
const zoneRow = z.strictObject({
  zone: whole(1, maxZones).describe('The number of the zone.'),
  ...shape(zoneFieldNames, name => described(number, zoneFields[name].help, unitsOf(zoneFields[name].unit))),
})

/** The JSON form as a program may send it: optional keys may be null or empty, lists and sections may be missing. */
export const settingsInput = z.strictObject({
  schema: z.literal(schemaName),
  unit: z.strictObject({
    serial: text(textRules.serial).describe('Compared without case.'),
    channel: optional(whole(0, maxChannel)).describe('Only for a drive with several axes.'),
    model: text(textRules.model),
    firmware: optional(text(textRules.firmware)),
    actuatorSerial: optional(text(textRules.actuatorSerial)),
    actuatorModel: optional(text(textRules.actuatorModel)),
  }),
  exportedAt: text(textRules.exportedAt).describe('RFC 3339 with offset, a real day.'),
  exportedBy: optional(text(textRules.exportedBy)),
  note: optional(text(textRules.note)),
  axisKind: z.enum(axisKinds),
  setup: z.strictObject(shape(setupFieldNames, name => setupSchema(setupFields[name]))).nullish(),
  zones: z.array(zoneRow).max(maxZones).nullish(),
  moves: z.array(moveRow).max(maxMoves).nullish(),
  extra: z.record(extraKey, extraValue).nullish().describe(`Whatever else the drive holds; at most ${maxExtra} values.`),
  readings: z.record(extraKey, extraValue).nullish().describe(`Hours, cycles, temperatures: values that are no settings; at most ${maxReadings}.`),
})

/** The published JSON Schema, draft 2020-12, of the input shape. */
export function settingsJsonSchema(): Record<string, unknown> {
  return z.toJSONSchema(settingsInput, { target: 'draft-2020-12', io: 'input' })
}
