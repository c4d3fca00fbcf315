import { defineRoute } from '#server/http/route'
import { openApi } from '#server/services/openapi/openapi'

export default defineRoute('GET /api/openapi.json', () => openApi())
