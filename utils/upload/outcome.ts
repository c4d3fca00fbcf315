import { z } from 'zod'
import type { Problem } from '#shared/api/common'
import { uploadStored, uploadTray } from '#shared/api/uploads'
import { versionSchema } from '#shared/api/versions'

/** What became of one file that was sent. */
export type Outcome
  = | { readonly kind: 'version', readonly versionId: number, readonly tag: string, readonly number: number, readonly findings: number }
    | { readonly kind: 'seen', readonly tag: string, readonly number: number }
    | { readonly kind: 'tray', readonly trayId: number, readonly detail: string }
    | { readonly kind: 'unreadable', readonly trayId: number | null, readonly detail: string }
  /** Nothing was kept. `again`: the same file may go through later. */
    | { readonly kind: 'refused', readonly status: number, readonly why: string, readonly again: boolean }

const storedVersion = versionSchema.pick({ id: true, axisTag: true, number: true })
const seenAnswer = z.object({ sighting: z.object({ id: z.int() }), version: storedVersion })
const storedAnswer = uploadStored.pick({ findings: true }).extend({ version: storedVersion })
const answer = z.union([seenAnswer, storedAnswer, uploadTray])

/** Reads the answer of POST /api/uploads: a sighting, a version, or the tray. Any other shape is an error. */
export function outcomeOf(body: unknown): Outcome {
  const read = answer.parse(body)
  if ('sighting' in read) return { kind: 'seen', tag: read.version.axisTag, number: read.version.number }
  if ('tray' in read) return { kind: 'tray', trayId: read.tray, detail: read.detail }
  return { kind: 'version', versionId: read.version.id, tag: read.version.axisTag, number: read.version.number, findings: read.findings.filter(({ state }) => state === 'open').length }
}

const refusals: Readonly<Record<number, string>> = {
  0: 'The vault did not answer. The file is still in this page',
  401: 'You are signed out. Sign in again, then send it again',
  403: 'Your role does not allow it',
  413: 'Too large. A settings file has at most 2 MiB',
  415: 'This is no settings file: neither JSON nor CSV',
  429: 'Too many at once. Send it again in a minute',
  507: 'The vault’s disk is full. Nothing is half-written; the file is still in this page',
}
const mayComeAgain = new Set([0, 401, 408, 425, 429, 500, 502, 503, 504, 507])

/** What a refused upload means for the file. */
export function refusedOutcome(problem: Problem): Outcome {
  if (problem.code === 'settings-unreadable') return { kind: 'unreadable', trayId: problem.tray ?? null, detail: problem.detail }
  return { kind: 'refused', status: problem.status, why: refusals[problem.status] ?? problem.detail, again: mayComeAgain.has(problem.status) }
}

export const isKept = (outcome: Outcome): boolean => outcome.kind !== 'refused'
