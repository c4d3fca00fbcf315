import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { closeSession } from '#server/http/session'

export default defineRoute('POST /api/sign-out', async ({ actor, event }) => {
  await closeSession(event, actor)
  return answer(204, null)
})
