import { defineRoute } from '#server/http/route'
import { assertReadsWhole, verifierKey } from '#server/services/trail/trail'

export default defineRoute('GET /api/log/key', ({ actor, vault }) => {
  assertReadsWhole(actor)
  return verifierKey(vault)
})
