import { StreamAnswer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { attachmentFile } from '#server/services/attachments/read-attachments'

export default defineRoute('GET /api/attachments/:id/file', ({ subject, vault }) => {
  const { chunks, size, mediaType, name, etag } = attachmentFile(vault, subject.id)
  return new StreamAnswer(chunks, size, mediaType, name, etag)
})
