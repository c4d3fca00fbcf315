import { z } from 'zod'
import { problemSchema } from '#shared/api/common'
import { uploadStored, uploadTray } from '#shared/api/uploads'
import { versionSchema } from '#shared/api/versions'

/** What became of one file that was sent. */
export type Outcome =
  | { readonly kind: 'version', readonly versionId: number, readonly tag: string, readonly number: number, readonly findings: number }
  | { readonly kind: 'seen', readonly tag: string, readonly number: number }
  | { readonly kind: 'tray', readonly trayId: number, readonly detail: string }
  | { readonly kind: 'unreadable', readonly trayId: number | null, readonly detail: string }
  /** Nothing was kept. `again`: the same file may go through later. */
  | { readonly kind: 'refused', readonly why: string, readonly again: boolean }

const storedVersion = versionSchema.pick({ id: true, axisTag: true, number: true })
const storedAnswer = uploadStored.pick({ findings: true }).extend({ version: storedVersion })
const seenAnswer = z.object({ version: storedVersion })

/** The network, or no reception: the file is still here. */
export const notReached: Outcome = { kind: 'refused', why: 'The vault did not answer. Nothing is half-written; the file is still in this page', again: true }

const refusals: Readonly<Record<number, string>> = {
  401: 'You are signed out. Sign in again, then send it again',
  403: 'Your role does not allow it',
  413: 'Too large. A settings file has at most 2 MiB',
  415: 'This is no settings file: neither JSON nor CSV',
  429: 'Too many at once. Send it again in a minute',
  507: 'The vault’s disk is full. Nothing is half-written; the file is still in this page',
}
const mayComeAgain = new Set([401, 408, 425, 429, 500, 502, 503, 504, 507])

function refusal(status: number, body: unknown): Outcome {
  const problem = problemSchema.partial().safeParse(body)
  const said = problem.success ? problem.data : {}
  if (status === 422 && said.code === 'settings-unreadable') {
    return { kind: 'unreadable', trayId: said.tray ?? null, detail: said.detail ?? 'Not readable' }
  }
  const why = refusals[status] ?? said.detail ?? said.title ?? `The vault refused it (${status})`
  return { kind: 'refused', why: refusals[status] && said.detail ? `${why}. ${said.detail}` : why, again: mayComeAgain.has(status) }
}

/** Reads the answer to POST /api/uploads by its status. */
export function outcomeOf(status: number, body: unknown): Outcome {
  if (status === 201) {
    const { version, findings } = storedAnswer.parse(body)
    return { kind: 'version', versionId: version.id, tag: version.axisTag, number: version.number, findings: findings.length }
  }
  if (status === 200) {
    const { version } = seenAnswer.parse(body)
    return { kind: 'seen', tag: version.axisTag, number: version.number }
  }
  if (status === 202) {
    const { tray, detail } = uploadTray.parse(body)
    return { kind: 'tray', trayId: tray, detail }
  }
  return refusal(status, body)
}

export const isKept = (outcome: Outcome): boolean => outcome.kind !== 'refused'
