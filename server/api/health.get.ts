import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { health } from '#server/services/health'

export default defineRoute('GET /api/health', ({ vault }) => {
  const state = health(vault)
  return answer(state.status === 'ok' ? 200 : 503, state)
})
