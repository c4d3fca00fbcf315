import { defineRoute } from '#server/http/route'
import { assertReadsWhole } from '#server/services/trail/trail'
import { trailState } from '#server/services/trail/verification'

export default defineRoute('GET /api/trail', ({ actor, vault }) => {
  assertReadsWhole(actor)
  return trailState(vault)
})
