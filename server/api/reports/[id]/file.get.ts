import { StreamAnswer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { reportFile } from '#server/services/reports/report-file'

export default defineRoute('GET /api/reports/:id/file', ({ input, actor, vault }) => {
  const { chunks, mediaType, name } = reportFile(vault, actor, input.params.id, input.query)
  return new StreamAnswer(chunks, null, mediaType, name)
})
