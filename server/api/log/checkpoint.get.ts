import { file } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { assertReadsWhole, checkpointNow } from '#server/services/trail/trail'

export default defineRoute('GET /api/log/checkpoint', ({ actor, vault }) => {
  assertReadsWhole(actor)
  return file(checkpointNow(vault).note, 'text/plain; charset=utf-8')
})
