import { z } from 'zod'

/** Why an axis could not be restored tonight, the gravest first. */
export const lacks = ['no-known-good', 'too-old', 'overdue', 'no-spare', 'no-attachment', 'no-label'] as const
export type Lack = (typeof lacks)[number]

export const readinessSchema = z.object({ ready: z.boolean(), lacks: z.array(z.enum(lacks)) })
export type Readiness = z.infer<typeof readinessSchema>
