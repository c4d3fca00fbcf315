import type { SetupFieldName, SetupValues } from './fields'

export const schemaName = 'witnessmark.axis-settings/1'

export const axisKinds = ['linear', 'rotary'] as const
export type AxisKind = (typeof axisKinds)[number]

/** What a change of the value can do: hurt or break (harm), change the work (motion), neither (text). */
export const weights = ['harm', 'motion', 'text'] as const
export type Weight = (typeof weights)[number]

/** What becomes of the value when it goes to another unit. */
export const carries = ['copy', 'prove', 'teach', 'place'] as const
export type Carry = (typeof carries)[number]

export const moveKinds = ['absolute', 'relative', 'press'] as const
export type MoveKind = (typeof moveKinds)[number]

export const turns = ['signed', 'positive', 'negative', 'shortest'] as const
export type Turn = (typeof turns)[number]

export const axisFlags = ['gravity', 'press', 'collision'] as const
export type AxisFlag = (typeof axisFlags)[number]

/** A value of `extra`: the drive's own number or word, or a number with the drive's own unit. */
export type ExtraValue = number | boolean | string | { readonly value: number, readonly unit: string }

/** Output on while the position is inside; mm or deg. */
export interface Zone { readonly zone: number, readonly from: number, readonly to: number }

/** One row of the move table, in canonical units (mm or deg, s, %, ms). Absent = not set. */
export interface Move {
  readonly move: number
  readonly label?: string
  readonly comment?: string
  readonly kind: MoveKind
  readonly target: number
  readonly turn?: Turn
  readonly speed: number
  readonly acceleration: number
  readonly deceleration?: number
  readonly forceLimit?: number
  readonly approach?: number
  readonly pressSpeed?: number
  readonly window?: number
  readonly next?: number
  readonly dwell?: number
}

export type Setup = SetupValues
export type { SetupFieldName }

/** What a unit is set to, canonical: zones by zone, moves by move, absent keys left out. This is what is hashed. */
export interface Content {
  readonly axisKind: AxisKind
  readonly extra: Readonly<Record<string, ExtraValue>>
  readonly moves: readonly Move[]
  readonly setup: Readonly<Setup>
  readonly zones: readonly Zone[]
}

export interface UnitIdentity {
  readonly serial: string
  readonly channel?: number
  readonly model: string
  readonly firmware?: string
  readonly actuatorSerial?: string
  readonly actuatorModel?: string
}

/** One settings file, read: content, plus who, when and the readings that are no settings. */
export interface SettingsFile extends Content {
  readonly schema: typeof schemaName
  readonly unit: UnitIdentity
  readonly exportedAt: string
  readonly exportedBy?: string
  readonly note?: string
  readonly readings: Readonly<Record<string, ExtraValue>>
}

export const formatErrorCodes = [
  'json-syntax', 'csv-syntax', 'encoding', 'header', 'decimal-mixed', 'number-unclear', 'number-syntax', 'number-range',
  'number-digits', 'unit-unknown', 'unit-unfit', 'key-unknown', 'key-duplicate', 'value-duplicate', 'missing',
  'not-allowed-here', 'enum', 'text-length', 'text-character', 'row-number', 'row-duplicate', 'order', 'limit',
  'nesting', 'schema-version',
] as const
export type FormatErrorCode = (typeof formatErrorCodes)[number]

/** One thing wrong in a file. `at` points into the JSON form, rows by index as sent; line and column count from 1. */
export interface FormatError {
  readonly at: string
  readonly line?: number
  readonly column?: number
  readonly code: FormatErrorCode
  /** Names the value and what would be right. */
  readonly message: string
  /** The value as it stands in the file, cut to 80 characters. */
  readonly value?: string
  /** What was probably meant, where that can be told. */
  readonly meant?: string
}

/** The receipt: what reading did to the file without changing its meaning. */
export interface Normalised {
  readonly form: 'json' | 'csv'
  /** How many values lost digits beyond the sixth decimal. */
  readonly rounded: number
  /** How many values were converted from another unit. */
  readonly converted: number
  readonly encoding: 'utf-8' | 'utf-8-bom' | 'utf-16le' | 'utf-16be' | 'windows-1252'
  /** Texts that were not ASCII in a Windows-1252 file: to be looked at. */
  readonly decodedTexts: readonly string[]
  readonly delimiter?: ',' | ';' | '\t'
  readonly decimal?: 'point' | 'comma'
}

export interface ReadSettings {
  readonly file: SettingsFile
  readonly content: Content
  readonly normalised: Normalised
}

/** Either the file, or the first 100 errors and how many more there are. */
export type ReadOutcome
  = | { readonly ok: true, readonly value: ReadSettings }
    | { readonly ok: false, readonly errors: readonly FormatError[], readonly more: number }
