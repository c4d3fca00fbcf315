import { defineRoute } from '#server/http/route'
import { registerSite } from '#server/services/places/sites'

export default defineRoute('POST /api/sites', ({ input, actor, vault, once }) => once(() => registerSite(vault, actor, input.body)))
