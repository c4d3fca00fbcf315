import { defineRoute } from '#server/http/route'
import { hashFor, registerPerson } from '#server/services/people/people'

export default defineRoute('POST /api/people', async ({ input: { body }, actor, vault, once }) => {
  const hash = await hashFor(vault, body.password, [body.name, body.email])
  return once(() => registerPerson(vault, actor, body, hash))
})
