import { defineRoute } from '#server/http/route'
import { readBoard } from '#server/services/board/board'

export default defineRoute('GET /api/board', ({ actor, vault }) => readBoard(vault, actor))
