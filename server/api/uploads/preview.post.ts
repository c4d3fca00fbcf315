import { defineRoute } from '#server/http/route'
import { readUploadBody } from '#server/http/upload-body'
import { previewUpload } from '#server/services/uploads/preview-upload'

export default defineRoute('POST /api/uploads/preview', async ({ input, actor, vault, event }) => {
  const { sent, fields } = await readUploadBody(event.node.req, input.query)
  return previewUpload(vault, actor, sent, fields)
})
