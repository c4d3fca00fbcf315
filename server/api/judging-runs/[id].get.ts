import { defineRoute } from '#server/http/route'
import { readRun } from '#server/services/judging/runs'

export default defineRoute('GET /api/judging-runs/:id', ({ input, actor, vault }) => readRun(vault, actor, input.params.id, input.query.from))
