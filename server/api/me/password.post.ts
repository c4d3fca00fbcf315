import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { newOwnPassword, setOwnPassword } from '#server/services/people/own-password'

export default defineRoute('POST /api/me/password', async ({ input, actor, vault, once }) => {
  const hash = await newOwnPassword(vault, actor, input.body)
  return once(() => {
    setOwnPassword(vault, actor, hash)
    return answer(204, null)
  })
})
