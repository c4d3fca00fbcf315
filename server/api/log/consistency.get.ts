import { defineRoute } from '#server/http/route'
import { assertReadsWhole, proveConsistency } from '#server/services/trail/trail'

export default defineRoute('GET /api/log/consistency', ({ input, actor, vault }) => {
  assertReadsWhole(actor)
  return proveConsistency(vault, input.query.from, input.query.to)
})
