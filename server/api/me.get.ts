import { defineRoute } from '#server/http/route'
import { me } from '#server/services/people/people'

export default defineRoute('GET /api/me', ({ actor, vault }) => me(vault, actor))
