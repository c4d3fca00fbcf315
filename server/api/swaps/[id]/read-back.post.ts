import { readBackQuery } from '#shared/api/swaps'
import { answer } from '#server/http/answer'
import { problemOf } from '#server/http/errors'
import { defineRoute } from '#server/http/route'
import { readUploadBody } from '#server/http/upload-body'
import { readBackUnit } from '#server/services/swaps/read-back'

export default defineRoute('POST /api/swaps/:id/read-back', async ({ input, subject, actor, vault, event, once }) => {
  const { sent, fields, digest } = await readUploadBody(event.node.req, input.query, readBackQuery)
  return once(() => {
    const read = readBackUnit(vault, actor, subject.id, sent, fields)
    if (read.ok) return answer(200, read.answer)
    const problem = problemOf(read.refusal)
    return answer(problem.status, problem)
  }, digest)
})
