import { answer } from '#server/http/answer'
import { problemOf } from '#server/http/errors'
import { defineRoute } from '#server/http/route'
import { readUploadBody } from '#server/http/upload-body'
import { storeUpload } from '#server/services/uploads/store-upload'

export default defineRoute('POST /api/uploads', async ({ input, actor, vault, event, once }) => {
  const { sent, fields, digest } = await readUploadBody(event.node.req, input.query)
  return once(() => {
    const stored = storeUpload(vault, actor, sent, fields)
    if (stored.outcome === 'unreadable') return answer(422, problemOf(stored.refusal))
    return answer({ version: 201, sighting: 200, tray: 202 }[stored.outcome], stored.answer)
  }, digest)
})
