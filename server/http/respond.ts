import { setResponseHeaders, setResponseStatus, type H3Event } from 'h3'
import { codedOf, isRefusal, problemOf } from './errors'
import { FileAnswer, type Answer } from './answer'

/** An answer of the interface is data: shown by itself it runs nothing and is framed nowhere. */
const dataOnly = { 'content-security-policy': 'default-src \'none\'; frame-ancestors \'none\'; sandbox', 'cross-origin-resource-policy': 'same-origin' }

/** JSON with the status, or a file; nothing of it is kept by browser or proxy unless it is immutable and says so by its ETag. */
export function sendAnswer(event: H3Event, answer: Answer | FileAnswer): string | Buffer | null {
  if (answer instanceof FileAnswer) return sendFile(event, answer)
  setResponseStatus(event, answer.status)
  setResponseHeaders(event, { ...dataOnly, 'cache-control': 'no-store' })
  if (answer.status === 204) return null
  setResponseHeaders(event, { 'content-type': answer.status >= 400 ? 'application/problem+json' : 'application/json' })
  return JSON.stringify(answer.body)
}

function sendFile(event: H3Event, { body, mediaType, name, etag }: FileAnswer): Buffer | null {
  setResponseHeaders(event, {
    ...dataOnly,
    'content-type': mediaType,
    'cache-control': etag === null ? 'no-store' : 'private, no-cache',
    ...(etag === null ? {} : { etag: `"${etag}"` }),
    ...(name === null ? {} : { 'content-disposition': disposition(name) }),
  })
  const fresh = etag !== null && event.node.req.headers['if-none-match'] === `"${etag}"`
  setResponseStatus(event, fresh ? 304 : 200)
  return fresh ? null : body
}

/** RFC 6266: an ASCII name for all, and the true one in UTF-8. */
function disposition(name: string): string {
  const ascii = name.replaceAll(/[^\x20-\x7e]|["\\%]/g, '_')
  const utf8 = encodeURIComponent(name).replaceAll(/['()*]/g, sign => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`)
  return `attachment; filename="${ascii}"; filename*=UTF-8''${utf8}`
}

/** The problem of whatever was thrown; what is a fault of ours is logged whole and told without any of its inside. */
export function sendProblem(event: H3Event, error: unknown): string {
  const coded = codedOf(error)
  if (!isRefusal(error)) event.context.server.logger.error({ err: error, method: event.node.req.method, path: event.path.replace(/\?.*$/s, '') }, coded.code)
  const problem = problemOf(coded)
  setResponseStatus(event, problem.status)
  setResponseHeaders(event, { ...dataOnly, 'content-type': 'application/problem+json', 'cache-control': 'no-store' })
  if (typeof coded.details.retryAfter === 'number') setResponseHeaders(event, { 'retry-after': coded.details.retryAfter })
  return JSON.stringify(problem)
}
