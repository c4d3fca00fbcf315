import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { askReport } from '#server/services/reports/reports'

export default defineRoute('POST /api/reports', ({ input, actor, vault, once }) => once(() => answer(201, askReport(vault, actor, input.body))))
