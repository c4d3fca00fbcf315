import { CodedError } from '#shared/errors/coded'
import { problemSchema, type Problem } from '#shared/api/common'

/** What an interface call was answered with when it was not done: RFC 9457 problem details, or no answer at all. */
export class ApiProblem extends CodedError {
  constructor(readonly problem: Problem) {
    super(problem.code, problem.detail, { status: problem.status })
    this.name = 'ApiProblem'
  }

  /** Nothing came back: the request may or may not have arrived. */
  get unanswered(): boolean {
    return this.problem.status === 0
  }
}

const noAnswer: Problem = {
  type: 'about:blank', title: 'The vault does not answer.', status: 0, code: 'no-answer',
  detail: 'No reception, or the vault is not running. What is on this page stays as it was.',
}

const unreadable = (status: number): Problem => ({
  type: 'about:blank', title: 'The vault answered with something unexpected.', status, code: 'unreadable-answer',
  detail: `Status ${status}. Try again; if it stays, tell your administrator.`,
})

/** Any failure of a fetch as a problem that a page can show. */
export function toProblem(failure: unknown): ApiProblem {
  if (failure instanceof ApiProblem) return failure
  const { data, status, statusCode } = (failure ?? {}) as { data?: unknown, status?: number, statusCode?: number }
  const read = problemSchema.safeParse(data)
  if (read.success) return new ApiProblem(read.data)
  const answered = status ?? statusCode
  return new ApiProblem(answered ? unreadable(answered) : noAnswer)
}
