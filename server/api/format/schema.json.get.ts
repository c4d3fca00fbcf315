import { settingsJsonSchema } from '#shared/settings/schema'
import { file } from '#server/http/answer'
import { defineRoute } from '#server/http/route'

export default defineRoute('GET /api/format/schema.json', () => file(JSON.stringify(settingsJsonSchema(), null, 2), 'application/schema+json'))
