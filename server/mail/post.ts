import { CodedError } from '#shared/errors/coded'
import type { Message } from './message'

/** refused: trying again as it is would be answered the same. unreachable: later it may go. */
export type PostErrorCode = 'refused' | 'unreachable'
/** Why a letter did not leave, in words for the administrator; no password stands in them. */
export class PostError extends CodedError<PostErrorCode> {}

/** The way that letters leave by. */
export interface Post {
  readonly way: 'smtp' | 'folder'
  /** Who the letters are from, as in their head. */
  readonly from: string
  /** Settles once the other side has taken it; throws PostError. */
  readonly send: (message: Message) => Promise<void>
  readonly close: () => void
}
