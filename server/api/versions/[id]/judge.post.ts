import { defineRoute } from '#server/http/route'
import { judgeVersion } from '#server/services/judging/judge-again'

export default defineRoute('POST /api/versions/:id/judge', ({ subject, actor, vault, once }) => once(() => judgeVersion(vault, actor, subject.id)))
