import { defineEventHandler, setResponseHeader } from 'h3'
import { methodsOf } from '#shared/api/match'
import { Refusal } from '#shared/errors/refusal'
import { sendProblem } from '#server/http/respond'

/** Whatever no route took: without this the application's page would answer. */
export default defineEventHandler((event) => {
  const path = event.path.replace(/\?.*$/s, '')
  const methods = methodsOf(path)
  if (methods.length === 0) return sendProblem(event, new Refusal('no-route', `There is no ${path} here. GET /api/openapi.json lists what there is.`))
  setResponseHeader(event, 'allow', methods.join(', '))
  return sendProblem(event, new Refusal('method', `${path} takes ${methods.join(' and ')}, not ${event.method}.`))
})
