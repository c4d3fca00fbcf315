import { defineRoute } from '#server/http/route'
import { openSession, peerOf } from '#server/http/session'
import { meOf } from '#server/services/people/people'
import { signIn } from '#server/services/people/sign-in'

export default defineRoute('POST /api/sign-in', async ({ input, vault, event }) => {
  const { email, password, panel = false } = input.body
  const person = await signIn(vault, email, password, peerOf(event))
  await openSession(event, person.id, panel)
  return meOf(vault, person.id)
})
