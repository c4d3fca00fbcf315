import { CodedError } from '#shared/errors/coded'

export type StartErrorCode
  = 'sqlite-too-old' | 'in-use' | 'schema-newer' | 'schema-edited' | 'pragma' | 'secret-weak' | 'public-url' | 'smtp-url'

/** Why the vault does not open. The message is for whoever runs the machine, and says what to do. */
export class StartError extends CodedError<StartErrorCode> {}
