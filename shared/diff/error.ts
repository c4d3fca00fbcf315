import { CodedError } from '../errors/coded'

/** `wrong-base`: the changes do not start from the content they were applied to. */
export class DiffError extends CodedError<'wrong-base'> {}
