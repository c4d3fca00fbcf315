import { defineRoute } from '#server/http/route'
import { openSession } from '#server/http/session'
import { setUp } from '#server/services/people/first-start'
import { meOf } from '#server/services/people/people'

export default defineRoute('POST /api/set-up', async ({ input, vault, event }) => {
  const { token, ...admin } = input.body
  const id = await setUp(vault, token, admin)
  await openSession(event, id, false)
  return meOf(vault, id)
})
