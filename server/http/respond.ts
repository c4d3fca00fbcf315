import { setResponseHeaders, setResponseStatus, type H3Event } from 'h3'
import { codedOf, isRefusal, problemOf } from './errors'
import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import { FileAnswer, StreamAnswer, type Answer } from './answer'

/** An answer of the interface is data: shown by itself it runs nothing and is framed nowhere. */
const dataOnly = { 'content-security-policy': 'default-src \'none\'; frame-ancestors \'none\'; sandbox', 'cross-origin-resource-policy': 'same-origin' }

/** JSON with the status, or a file; nothing of it is kept by browser or proxy unless it is immutable and says so by its ETag. */
export async function sendAnswer(event: H3Event, answer: Answer | FileAnswer | StreamAnswer): Promise<string | Buffer | null> {
  if (answer instanceof FileAnswer) return sendFile(event, answer)
  if (answer instanceof StreamAnswer) return sendStream(event, answer)
  setResponseStatus(event, answer.status)
  setResponseHeaders(event, { ...dataOnly, 'cache-control': 'no-store' })
  if (answer.status === 204) return null
  setResponseHeaders(event, { 'content-type': answer.status >= 400 ? 'application/problem+json' : 'application/json' })
  return JSON.stringify(answer.body)
}

function sendFile(event: H3Event, answer: FileAnswer): Buffer | null {
  return fileHead(event, answer) ? null : answer.body
}

/** Sets the head of a file's answer; whether the caller has these very bytes already. */
function fileHead(event: H3Event, { mediaType, name, etag }: Pick<FileAnswer, 'mediaType' | 'name' | 'etag'>): boolean {
  setResponseHeaders(event, {
    ...dataOnly,
    'content-type': mediaType,
    'cache-control': etag === null ? 'no-store' : 'private, no-cache',
    ...(etag === null ? {} : { etag: `"${etag}"` }),
    ...(name === null ? {} : { 'content-disposition': disposition(name) }),
  })
  const fresh = etag !== null && event.node.req.headers['if-none-match'] === `"${etag}"`
  setResponseStatus(event, fresh ? 304 : 200)
  return fresh
}

/** Where the length is told beforehand a stream that breaks leaves the caller short of it, else without its end. */
async function sendStream(event: H3Event, answer: StreamAnswer): Promise<null> {
  const chunks = iteratorOf(answer.chunks)
  const first = await chunks.next()
  if (fileHead(event, answer)) return null
  if (answer.size !== null) setResponseHeaders(event, { 'content-length': answer.size })
  if (event.node.req.method === 'HEAD') return null
  try {
    await pipeline(Readable.from(rest(first, chunks)), event.node.res)
  }
  catch (error) {
    // The caller went away before the end: nobody is left to be told.
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error
  }
  return null
}

const iteratorOf = (chunks: StreamAnswer['chunks']): Iterator<Buffer> | AsyncIterator<Buffer> =>
  Symbol.asyncIterator in chunks ? chunks[Symbol.asyncIterator]() : chunks[Symbol.iterator]()

async function* rest(first: IteratorResult<Buffer>, chunks: Iterator<Buffer> | AsyncIterator<Buffer>): AsyncGenerator<Buffer> {
  for (let next = first; next.done !== true; next = await chunks.next()) yield next.value
}

/** RFC 6266: an ASCII name for all, and the true one in UTF-8. */
function disposition(name: string): string {
  const ascii = name.replaceAll(/[^\x20-\x7e]|["\\%]/g, '_')
  const utf8 = encodeURIComponent(name).replaceAll(/['()*]/g, sign => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`)
  return `attachment; filename="${ascii}"; filename*=UTF-8''${utf8}`
}

/** The problem of whatever was thrown; what is a fault of ours is logged whole and told without any of its inside. */
export function sendProblem(event: H3Event, error: unknown): string | null {
  const coded = codedOf(error)
  if (!isRefusal(error)) event.context.server.logger.error({ err: error, method: event.node.req.method, path: event.path.replace(/\?.*$/s, '') }, coded.code)
  // A stream that broke: its head is out, and the connection is cut.
  if (event.node.res.headersSent) return null
  const problem = problemOf(coded)
  setResponseStatus(event, problem.status)
  setResponseHeaders(event, { ...dataOnly, 'content-type': 'application/problem+json', 'cache-control': 'no-store' })
  if (typeof coded.details.retryAfter === 'number') setResponseHeaders(event, { 'retry-after': coded.details.retryAfter })
  return JSON.stringify(problem)
}
