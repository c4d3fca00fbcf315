import { defineRoute } from '#server/http/route'
import { assertReadsWhole, proveEntry } from '#server/services/trail/trail'

export default defineRoute('GET /api/log/proof', ({ input, actor, vault }) => {
  assertReadsWhole(actor)
  return proveEntry(vault, input.query.entry, input.query.size)
})
