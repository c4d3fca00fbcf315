import { setResponseHeader } from 'h3'
import { file } from '#server/http/answer'
import { originOf } from '#server/http/origin'
import { defineRoute } from '#server/http/route'
import { makeKit, takeKit } from '#server/services/kit/make-kit'

export default defineRoute('POST /api/axes/:id/kit', async ({ input, subject, actor, vault, event, once }) => {
  const made = await makeKit(vault, actor, subject.id, input.body, originOf(event))
  return once(() => {
    const { bytes, mediaType, name, released } = takeKit(vault, actor, made)
    setResponseHeader(event, 'witnessmark-released', released ? 'yes' : 'no')
    return file(bytes, mediaType, { name })
  })
})
