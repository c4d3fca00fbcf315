import { defineRoute } from '#server/http/route'
import { changePerson, findPerson, hashFor } from '#server/services/people/people'

export default defineRoute('PATCH /api/people/:id', async ({ input: { params, body }, actor, vault }) => {
  const { name, email } = findPerson(vault, params.id)
  const hash = await hashFor(vault, body.password, [body.name ?? name, body.email ?? email])
  return changePerson(vault, actor, params.id, body, hash)
})
