import { StreamAnswer } from '#server/http/answer'
import { originOf } from '#server/http/origin'
import { defineRoute } from '#server/http/route'
import { folderFile } from '#server/services/line-folder/kept-folders'

export default defineRoute('GET /api/lines/:id/folder', async ({ input, subject, vault, event }) => {
  const { chunks, size, name } = await folderFile(vault, subject.id, input.query.kept === 'true', originOf(event))
  return new StreamAnswer(chunks, size, 'application/zip', name)
})
