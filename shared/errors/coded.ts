/**
 * An error that a program can tell apart by `code`; `message` is for people and may change.
 * `details` holds what the message was made from, never a secret.
 */
export class CodedError<Code extends string = string> extends Error {
  constructor(
    readonly code: Code,
    message: string,
    readonly details: Readonly<Record<string, unknown>> = {},
  ) {
    super(message)
    this.name = 'CodedError'
  }
}
