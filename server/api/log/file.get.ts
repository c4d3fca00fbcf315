import { StreamAnswer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { assertReadsWhole, logFile } from '#server/services/trail/trail'

export default defineRoute('GET /api/log/file', ({ actor, vault }) => {
  assertReadsWhole(actor)
  const { chunks, name } = logFile(vault)
  return new StreamAnswer(chunks, null, 'text/plain; charset=utf-8', name)
})
