import { defineEventHandler } from 'h3'
import { Refusal } from '#shared/errors/refusal'
import { sendProblem } from '#server/http/respond'

/** Whatever no route took: without this the application's page would answer. */
export default defineEventHandler(event => sendProblem(event, new Refusal('no-route', `There is no ${event.method} ${event.path.replace(/\?.*$/s, '')} here. GET /api/openapi.json lists what there is.`)))
