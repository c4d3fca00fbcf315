import { StreamAnswer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { historyFile } from '#server/services/history/file'
import { listHistory } from '#server/services/history/history'
import { restsOf } from '#server/services/history/rests'

export default defineRoute('GET /api/history', ({ input: { query }, actor, vault }) => {
  const { form } = query
  if (form === undefined) return listHistory(vault, actor, query)
  if (form === 'json') return { ...listHistory(vault, actor, query), rests: restsOf(vault, actor, query) }
  const { chunks, mediaType, name } = historyFile(vault, actor, query, form)
  return new StreamAnswer(chunks, null, mediaType, name)
})
