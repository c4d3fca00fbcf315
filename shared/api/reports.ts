import { z } from 'zod'
import { idSchema, idText, instantSchema, listQuery } from './common'
import { papers } from './places'

export const reportScopes = ['site', 'line', 'machine', 'axis'] as const
export type ReportScope = (typeof reportScopes)[number]

const stretch = { from: instantSchema.optional(), to: instantSchema.optional() }

/** Of which place and which time; without a place of every axis that the asker sees. From including, to not including, by when the vault received it. */
export const reportBody = z.strictObject({ scope: z.enum(reportScopes).optional(), scopeId: idSchema.optional(), ...stretch, paper: z.enum(papers).optional().describe('as the site prints where it is left out') })
  .refine(({ scope, scopeId }) => (scope === undefined) === (scopeId === undefined), { message: 'scope and scopeId stand together', path: ['scopeId'] })
export const reportQuery = listQuery.extend({ scope: z.enum(reportScopes).optional(), scopeId: idText.optional() })
export const reportForms = ['pdf', 'json'] as const
export const reportFileQuery = z.strictObject({ form: z.enum(reportForms).optional(), paper: z.enum(papers).optional() })

/** A report that was asked for; its file is made of what the vault held at `askedAt`, whenever it is taken. */
export const reportSchema = z.object({
  id: idSchema, scope: z.enum(reportScopes).nullable(), scopeId: idSchema.nullable(), subject: z.string().describe('the place in words'), timeZone: z.string(),
  from: instantSchema.nullable(), to: instantSchema.nullable(), paper: z.enum(papers), askedAt: instantSchema, askedBy: z.string(), size: z.int().describe('entries of the log then'),
  /** While its file is made: pages so far, and of how many once they are counted. */
  making: z.object({ pages: z.int(), of: z.int().nullable() }).nullable(),
})
export type Report = z.infer<typeof reportSchema>
