import { CodedError } from '../../shared/errors/coded'

/** The code of what a function throws; fails where it throws nothing, or something without a code. */
export function codeOf(run: () => unknown): string {
  try {
    run()
  }
  catch (error) {
    if (error instanceof CodedError) return error.code
    throw error
  }
  throw new Error('It threw nothing.')
}

/** As codeOf, of a promise. */
export async function codeOfAsync(run: () => Promise<unknown>): Promise<string> {
  try {
    await run()
  }
  catch (error) {
    if (error instanceof CodedError) return error.code
    throw error
  }
  throw new Error('It threw nothing.')
}
