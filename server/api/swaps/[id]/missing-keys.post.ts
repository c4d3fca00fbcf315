import { defineRoute } from '#server/http/route'
import { acceptMissingKeys } from '#server/services/swaps/read-back'

export default defineRoute('POST /api/swaps/:id/missing-keys', ({ input, subject, actor, vault, once }) => once(() => acceptMissingKeys(vault, actor, subject.id, input.body)))
