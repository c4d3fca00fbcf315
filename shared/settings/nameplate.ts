import { z } from 'zod'
import { entryTableFaults } from './entry-table/faults'
import { entryTableSchema } from './entry-table/schema'
import { axisKinds, carries, weights } from './types'

/*
 * What units of one model can do. Revisions are immutable: a change adds one. Every field but model, axisKind and stroke
 * may be missing; a rule that needs a missing one answers `unknown` and names it.
 */

const positive = z.number().positive().finite()
const zeroUp = z.number().min(0).finite()
const text = (most: number) => z.string().min(1).max(most)

/** What a model's `extra` key means: its words, its range, and how it weighs. */
export const dictionaryEntrySchema = z.strictObject({
  name: text(80).optional(),
  unit: text(16).optional(),
  min: z.number().finite().optional(),
  max: z.number().finite().optional(),
  allowed: z.array(z.union([z.number(), z.boolean(), z.string().max(256)])).max(64).optional(),
  weight: z.enum(weights).optional(),
  carry: z.enum(carries).optional(),
  /** Kept with the upload and left out of content from the next upload on. */
  reading: z.boolean().optional(),
})
export type DictionaryEntry = z.infer<typeof dictionaryEntrySchema>

/** What 100 % of thrust or torque in the settings means. */
export const forceBases = ['rated-thrust', 'peak-thrust'] as const

export const nameplateSchema = z.strictObject({
  model: text(64),
  axisKind: z.enum(axisKinds),
  stroke: positive.describe('mm or deg'),
  hardMargin: zeroUp.optional().describe('mm or deg from stroke end to hard stop, each end'),
  maxSpeed: positive.optional().describe('mm/s or deg/s'),
  maxAcceleration: positive.optional().describe('mm/s² or deg/s²'),
  ratedThrust: positive.optional().describe('N or N·m'),
  peakThrust: positive.optional().describe('N or N·m'),
  forceBase: z.enum(forceBases).optional().describe('what 100 % means; absent = rated-thrust'),
  pressForceMin: zeroUp.optional().describe('% of the force base'),
  pressForceMax: positive.optional().describe('% of the force base'),
  maxPressSpeed: positive.optional().describe('mm/s or deg/s'),
  forceLimitActsBothWays: z.boolean().optional(),
  stopsAtApproach: z.boolean().optional(),
  maxImpactEnergy: positive.optional().describe('J'),
  resolution: positive.optional().describe('mm or deg of one count'),
  shownDigit: positive.optional().describe('mm or deg: the last digit that the drive shows and stores'),
  truncates: z.boolean().optional().describe('the drive cuts digits off instead of rounding'),
  repeatability: positive.optional().describe('± mm or deg'),
  lead: positive.optional().describe('mm a turn of the screw'),
  gearRatio: positive.optional().describe('motor turns a turn of the output; absent = 1'),
  efficiency: z.number().positive().max(1).optional(),
  movingMass: zeroUp.optional().describe('kg'),
  rotorInertia: zeroUp.optional().describe('kg·cm²: motor, coupling, screw'),
  maxPayloadLevel: positive.optional().describe('kg'),
  maxPayloadVertical: positive.optional().describe('kg'),
  maxPayloadInertia: positive.optional().describe('kg·cm²'),
  maxMoves: z.int().min(1).max(1024).optional(),
  firstMove: z.union([z.literal(0), z.literal(1)]).optional().describe('absent = 0'),
  allOff: z.enum(['first', 'none', 'home']).optional().describe('what all select inputs off call; absent = first'),
  strobe: z.enum(['edge', 'level']).optional(),
  maxSelectInputs: z.int().min(0).max(10).optional(),
  inputFilterTime: zeroUp.optional().describe('ms'),
  inputSwitching: z.enum(['p', 'n']).optional(),
  outputSwitching: z.enum(['p', 'n']).optional(),
  brakeFitted: z.boolean().optional(),
  brakeCloseTime: zeroUp.optional().describe('ms'),
  brakeOpenTime: zeroUp.optional().describe('ms'),
  brakeHolding: positive.optional().describe('N or N·m'),
  maxOverloadTime: positive.optional().describe('ms'),
  encoder: z.enum(['incremental', 'absolute', 'absolute-battery']).optional(),
  homeOffsetSense: z.enum(['zero-is-home-plus-offset', 'home-reads-offset']).optional(),
  decimals: z.int().min(0).max(6).optional(),
  firmwareSeen: z.array(text(32)).max(64).optional(),
  note: z.string().max(2000).optional(),
  dictionary: z.record(text(64), dictionaryEntrySchema).optional(),
  entryTable: entryTableSchema.optional().describe('how a drive of this model names things'),
}).superRefine(({ entryTable, axisKind }, context) => {
  for (const { path, message } of entryTable ? entryTableFaults(entryTable, axisKind) : []) {
    context.addIssue({ code: 'custom', path: ['entryTable', ...path], message })
  }
})
export type Nameplate = z.infer<typeof nameplateSchema>
export type Dictionary = Readonly<Record<string, DictionaryEntry>>
