import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { assertReadsWhole } from '#server/services/trail/trail'
import { verifyAndRecord } from '#server/services/trail/verification'

export default defineRoute('POST /api/trail/verifications', async ({ actor, vault }) => {
  assertReadsWhole(actor)
  return answer(201, await verifyAndRecord(vault))
})
