import { defineRoute } from '#server/http/route'
import { voidVersion } from '#server/services/versions/void-version'

export default defineRoute('POST /api/versions/:id/void', ({ input, subject, actor, vault, once }) => once(() => voidVersion(vault, actor, subject.id, input.body.reason)))
