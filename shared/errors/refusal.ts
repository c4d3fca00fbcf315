import { CodedError } from './coded'

/** Why a request is turned down, as `code` of the problem that travels. Screens may go by it; statuses stand in server/http/errors.ts. */
export const refusalCodes = [
  'sign-in-needed', 'role', 'token-scope', 'origin', 'not-found', 'input', 'json-syntax', 'media-type', 'too-large', 'no-route', 'method',
  'signature', 'signing-password', 'four-eyes', 'throttled', 'sign-in-failed', 'set-up-done', 'set-up-token', 'password-weak', 'password-wrong',
  'rev-missing', 'edited-meanwhile', 'key-reused', 'taken', 'overlaps', 'site-bounds', 'last-admin', 'time-order', 'already-ended',
  'settings-unreadable', 'tray-full', 'tray-settled', 'stop-checks', 'already-void', 'marked', 'cautions-unread', 'no-known-good', 'forces-differ', 'axis-kind', 'no-entry-table', 'entry-table-unfit',
  'swap-open', 'swap-closed', 'step-missing', 'already-safe', 'forces-unconfirmed', 'unfit', 'same-unit', 'other-unit', 'already-back',
  'read-back-serial', 'read-back-model', 'read-back-twice', 'taught-missing', 'motion-fault', 'read-back-differs',
  'not-fitted', 'fitted', 'serial-unknown', 'time-zone', 'letter-under-way', 'finding-closed', 'finding-open', 'not-explained', 'still-stands', 'disk-full', 'fault',
] as const
export type RefusalCode = (typeof refusalCodes)[number]

/** A request turned down on purpose: `message` says in one sentence what to do next, `details` becomes part of the problem. */
export class Refusal extends CodedError<RefusalCode> {}
