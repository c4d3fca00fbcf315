import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { assertReadsWhole } from '#server/services/trail/trail'
import { keepVerification, verifyNow } from '#server/services/trail/verification'

export default defineRoute('POST /api/trail/verifications', async ({ actor, vault, once }) => {
  assertReadsWhole(actor)
  const ended = await verifyNow(vault)
  return once(() => answer(201, keepVerification(vault, ended)))
})
