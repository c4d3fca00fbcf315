import type { IncomingMessage } from 'node:http'
import { Refusal } from '#shared/errors/refusal'

/** Most bytes of a JSON body: 1 MiB, counted as they come, whatever Content-Length says. */
export const jsonLimit = 1024 * 1024
const mediaTypes = new Set(['application/json', 'application/merge-patch+json'])

/** The body as text and as a value. Texts with lone surrogates are refused: they have no UTF-8 and so no hash. */
export async function readJsonBody(request: IncomingMessage): Promise<{ text: string, value: unknown }> {
  const mediaType = (request.headers['content-type'] ?? '').replace(/;.*$/s, '').trim().toLowerCase()
  if (!mediaTypes.has(mediaType)) throw new Refusal('media-type', 'Send the body as application/json.')
  const text = await readText(request)
  return { text, value: parse(text) }
}

async function readText(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = []
  let size = 0
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length
    if (size > jsonLimit) throw new Refusal('too-large', 'A body may have 1 MiB (1,048,576 bytes); this one has more.')
    chunks.push(chunk)
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks, size))
  }
  catch {
    throw new Refusal('json-syntax', 'The body is not UTF-8.')
  }
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text, (key, value: unknown) => {
      if (typeof value === 'string' && !value.isWellFormed()) throw new Refusal('input', `${key}: half of a surrogate pair is no text.`)
      return value
    })
  }
  catch (error) {
    if (error instanceof Refusal) throw error
    throw new Refusal('json-syntax', `The body is not JSON: ${(error as Error).message}.`)
  }
}
