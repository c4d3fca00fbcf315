import { z } from 'zod'

/*
 * How a drive of one model names things, and how its own list is laid out. The list is a delimited text: first the lines
 * above the values, as the drive tool writes them, then one parameter a line, then the zones and the moves, each below a
 * line with the names of their columns. Lists here are whole: a change gives the list anew, so 0 and [] say "there is none".
 */

export const roundings = ['half-even', 'down', 'up'] as const
export type Rounding = (typeof roundings)[number]

const text = (most: number) => z.string().min(1).max(most)
const above = z.number().positive().finite()
const column = z.int().max(20)

/** What both a parameter and a column of a table say about their value. */
const valueFields = {
  field: text(80).describe('softLimitMin; zone:1:from; move:3:target; extra:KEY; unit:serial; file:exportedAt. In a table the name of its field alone'),
  unit: text(16).optional().describe('the drive’s unit; absent = the canonical one, or none'),
  factor: above.optional().describe('what one of the drive’s numbers stands for, in that unit; absent = 1'),
  step: above.optional().describe('the smallest step that the drive keeps, in that unit'),
  digits: z.int().min(0).max(9).optional().describe('digits after the decimal sign; absent = as many as it takes'),
  rounding: z.enum(roundings).optional().describe('to the step and the digits: half-even, down (towards 0), up (away from 0); absent = half-even'),
  words: z.record(text(40), text(40)).optional().describe('what the drive writes for a word: { "extend": "0", "retract": "1" }'),
  none: text(16).optional().describe('what the drive writes for a value that is not set; absent = nothing'),
}

export const parameterSchema = z.strictObject({
  number: text(64).describe('the drive’s own number, as it stands in the list'),
  name: text(80).optional().describe('the drive’s own name'),
  ...valueFields,
})
export const columnSchema = z.strictObject({ name: text(80).describe('the name above the column'), ...valueFields })
export type EntryParameter = z.infer<typeof parameterSchema>
export type EntryColumn = z.infer<typeof columnSchema>
export type EntryValue = Omit<EntryColumn, 'name'>

export const entryTableSchema = z.strictObject({
  delimiter: z.enum([',', ';', '\t']),
  decimal: z.enum(['point', 'comma']),
  header: z.array(z.string().max(400)).max(20).describe('the lines above the first parameter; the last of them is compared when a file is read'),
  columns: z.strictObject({
    number: column.min(1).describe('which column holds the number, counted from 1'),
    value: column.min(1).describe('which column holds the value'),
    name: column.min(0).describe('which column holds the name; 0 = there is none'),
    unit: column.min(0).describe('which column holds the unit; 0 = there is none'),
  }),
  parameters: z.array(parameterSchema).max(1000).describe('in the order of the drive'),
  zones: z.array(columnSchema).max(8).describe('the columns of the zones, the first one first in the file; [] = no such table'),
  moves: z.array(columnSchema).max(32).describe('the columns of the moves, the first one first in the file; [] = no such table'),
})
export type EntryTable = z.infer<typeof entryTableSchema>
