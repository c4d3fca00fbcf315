import { z } from 'zod'
import { idSchema, instantSchema, nameSchema, passwordSchema, roleSchema } from './common'

export const signInBody = z.strictObject({ email: z.string().min(3).max(254), password: passwordSchema, panel: z.boolean().optional().describe('a shared panel: signs out after 5 idle minutes') })
export const setUpBody = z.strictObject({ token: z.string().min(1).max(200), name: nameSchema, email: z.email().max(254), password: passwordSchema, plant: nameSchema.optional() })
export const ownPasswordBody = z.strictObject({ current: passwordSchema, password: passwordSchema })

export const meSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  roles: z.array(roleSchema),
  /** Sites this person may see; all of them where no bound is set. */
  sites: z.array(z.object({ id: idSchema, name: z.string(), timeZone: z.string() })),
  plant: z.string(),
  /** Nothing is registered yet: the first page says how to begin. */
  empty: z.boolean(),
  /** An account marked shared may upload, not sign. */
  shared: z.boolean(),
})
export type Me = z.infer<typeof meSchema>

export const personBody = z.strictObject({
  name: nameSchema,
  email: z.email().max(254),
  roles: z.array(roleSchema).min(1).max(4),
  siteIds: z.array(idSchema).max(1000).describe('empty = all sites'),
  shared: z.boolean().optional(),
  password: passwordSchema.optional().describe('at least 15 characters; works at once'),
})
export const personPatch = z.strictObject({
  rev: z.int().optional(),
  name: nameSchema.optional(),
  email: z.email().max(254).optional(),
  roles: z.array(roleSchema).min(1).max(4).optional(),
  siteIds: z.array(idSchema).max(1000).optional(),
  shared: z.boolean().optional(),
  password: passwordSchema.optional(),
  ended: z.boolean().optional().describe('true ends the account: the name stays, nobody signs in with it'),
})
export const personSchema = z.object({
  id: idSchema, rev: z.int(), name: z.string(), email: z.string(), roles: z.array(roleSchema), siteIds: z.array(idSchema),
  shared: z.boolean(), endedAt: instantSchema.nullable(), hasPassword: z.boolean(), lastSignInAt: instantSchema.nullable(),
})
export type Person = z.infer<typeof personSchema>

export const tokenScopes = ['upload', 'read'] as const
export const tokenBody = z.strictObject({
  name: nameSchema,
  scopes: z.array(z.enum(tokenScopes)).min(1).max(2),
  siteIds: z.array(idSchema).max(1000).describe('empty = all sites of the owner'),
  endsAt: instantSchema.describe('within a year'),
  ownerId: idSchema.optional().describe('who answers for it; default the maker'),
})
export const tokenSchema = z.object({
  id: idSchema, name: z.string(), scopes: z.array(z.enum(tokenScopes)), siteIds: z.array(idSchema), endsAt: instantSchema,
  endedAt: instantSchema.nullable(), ownerId: idSchema, ownerName: z.string(), madeAt: instantSchema, lastUsedAt: instantSchema.nullable(),
})
export type Token = z.infer<typeof tokenSchema>
export const tokenMade = z.object({ id: idSchema, token: z.string().describe('shown this once') })
