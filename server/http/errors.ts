import { CodedError } from '#shared/errors/coded'
import type { Problem, ProblemError } from '#shared/api/common'
import type { RefusalCode } from '#shared/errors/refusal'
import type { FileBodyCode } from './file-body'

/** The one mapping from code to HTTP status and title. A code that is missing here is a fault of ours and answers 500. */
const answers: Readonly<Record<RefusalCode | FileBodyCode | 'not-canonical', readonly [status: number, title: string]>> = {
  'sign-in-needed': [401, 'Sign in first'],
  'sign-in-failed': [401, 'E-mail or password is wrong'],
  'password-wrong': [403, 'The present password is wrong'],
  'role': [403, 'Another role may do this'],
  'token-scope': [403, 'The token does not reach so far'],
  'origin': [403, 'The request came from another site'],
  'site-bounds': [403, 'Only for people of all sites'],
  'signature': [403, 'Not signed'],
  'signing-password': [403, 'No signing password is set'],
  'four-eyes': [403, 'Another person must do this'],
  'set-up-token': [403, 'The set-up address does not hold'],
  'not-found': [404, 'Not there'],
  'no-route': [404, 'No such address'],
  'method': [405, 'Not with this method'],
  'taken': [409, 'Already in use'],
  'overlaps': [409, 'Taken in that time'],
  'edited-meanwhile': [409, 'Edited meanwhile'],
  'set-up-done': [409, 'Set up already'],
  'last-admin': [409, 'The last administrator'],
  'already-ended': [409, 'Ended already'],
  'tray-settled': [409, 'Settled already'],
  'stop-checks': [409, 'Stop checks stand'],
  'already-void': [409, 'Void already'],
  'marked': [409, 'Marked known-good'],
  'cautions-unread': [409, 'Cautions not acknowledged'],
  'no-known-good': [409, 'Nothing to restore'],
  'forces-differ': [409, 'Percentages mean other forces'],
  'axis-kind': [409, 'Another kind of axis'],
  'no-entry-table': [409, 'No entry table'],
  'entry-table-unfit': [409, 'The entry table does not hold it all'],
  'not-fitted': [409, 'Not fitted'],
  'fitted': [409, 'Still fitted'],
  'serial-unknown': [409, 'Unknown serial'],
  'letter-under-way': [409, 'Being sent'],
  'finding-closed': [409, 'Closed already'],
  'finding-open': [409, 'Still open'],
  'not-explained': [409, 'Not explained yet'],
  'still-stands': [409, 'Not put right'],
  'swap-open': [409, 'A swap is open'],
  'swap-closed': [409, 'The swap has ended'],
  'step-missing': [409, 'A step comes first'],
  'already-safe': [409, 'The unit is in already'],
  'forces-unconfirmed': [409, 'Forces not confirmed'],
  'unfit': [409, 'The unit does not fit'],
  'same-unit': [409, 'The unit that came out'],
  'other-unit': [409, 'Another unit'],
  'already-back': [409, 'Back already'],
  'read-back-serial': [409, 'A file of another unit'],
  'read-back-model': [409, 'A file of another model'],
  'read-back-twice': [409, 'The same file again'],
  'taught-missing': [409, 'Not taught yet'],
  'motion-fault': [409, 'A fault stands'],
  'read-back-differs': [409, 'The read-back differs'],
  'too-large': [413, 'Too large'],
  'media-type': [415, 'Not in this form'],
  'content-type': [415, 'Not in this form'],
  'input': [422, 'Not as it should be'],
  'json-syntax': [422, 'Not JSON'],
  'not-canonical': [422, 'Text that cannot be stored'],
  'password-weak': [422, 'Password too weak'],
  'time-order': [422, 'Times out of order'],
  'time-zone': [422, 'Unknown time zone'],
  'key-reused': [422, 'Idempotency-Key used for another request'],
  'settings-unreadable': [422, 'The file cannot be read'],
  'multipart-broken': [422, 'The form cannot be read'],
  'body-cut': [422, 'The file came in part'],
  'file-missing': [422, 'No file'],
  'file-twice': [422, 'Two files'],
  'field-twice': [422, 'A field twice'],
  'field-too-large': [422, 'A field too long'],
  'rev-missing': [428, 'Say which rev was read'],
  'throttled': [429, 'Too many failures'],
  'fault': [500, 'A fault of the vault'],
  'disk-full': [507, 'The disk is full'],
  'tray-full': [507, 'The tray is full'],
}

const known = (code: string): code is keyof typeof answers => Object.hasOwn(answers, code)

/** Whether an error is a refusal with a status of its own; anything else is a fault to be logged. */
export const isRefusal = (error: unknown): error is CodedError => error instanceof CodedError && known(error.code)

/** Problem details (RFC 9457) of a coded error. `errors`, `more`, `tray`, `current` and `missing` of its details travel, nothing else does. */
export function problemOf({ code, message, details }: CodedError): Problem {
  const [status, title] = known(code) ? answers[code] : answers.fault
  const problem: Problem = { type: `urn:witnessmark:problem:${code}`, title, status, detail: message, code }
  if (Array.isArray(details.errors)) problem.errors = details.errors as ProblemError[]
  if (typeof details.more === 'number') problem.more = details.more
  if (typeof details.tray === 'number') problem.tray = details.tray
  if (Array.isArray(details.missing)) problem.missing = details.missing as string[]
  if (details.current !== undefined) problem.current = details.current
  return problem
}

const full = new Set(['SQLITE_FULL', 'ENOSPC', 'EDQUOT', 'SQLITE_IOERR_WRITE'])

/** Turns whatever was thrown into a coded error: the disk being full is told, a fault says nothing of the inside. */
export function codedOf(error: unknown): CodedError {
  if (isRefusal(error)) return error
  const code = (error as { code?: unknown } | null)?.code
  if (typeof code === 'string' && full.has(code)) {
    return new CodedError('disk-full', 'The disk of the vault is full: nothing of this request was stored. Reading goes on; make room, then send it again.')
  }
  return new CodedError('fault', 'The vault made a fault; nothing of this request was stored. Its log on the server says what.')
}
