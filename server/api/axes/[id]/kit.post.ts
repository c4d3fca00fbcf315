import { setResponseHeader } from 'h3'
import { file } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { makeKit } from '#server/services/kit/make-kit'

export default defineRoute('POST /api/axes/:id/kit', ({ input, subject, actor, vault, event, once }) => once(() => {
  const { bytes, mediaType, name, released } = makeKit(vault, actor, subject.id, input.body)
  setResponseHeader(event, 'witnessmark-released', released ? 'yes' : 'no')
  return file(bytes, mediaType, { name })
}))
