import type { H3Event } from 'h3'
import type { IncomingMessage } from 'node:http'
import { Refusal } from '#shared/errors/refusal'

const safe = new Set(['GET', 'HEAD', 'OPTIONS'])

/**
 * Refuses an unsafe request that another site's page sent with somebody's cookie. Sec-Fetch-Site decides where the browser
 * sends it, else Origin does; with neither it was no browser. A bearer token is no cookie and is never sent by itself.
 */
export function assertOrigin(request: Pick<IncomingMessage, 'method' | 'headers'>, publicOrigin: string | null): void {
  const { headers } = request
  if (safe.has(request.method ?? 'GET') || headers.authorization !== undefined) return
  const site = headers['sec-fetch-site']
  if (site !== undefined) {
    if (site === 'same-origin' || site === 'none') return
    throw refused()
  }
  if (headers.origin !== undefined && !sameOrigin(headers.origin, publicOrigin, headers.host)) throw refused()
}

function sameOrigin(origin: string, publicOrigin: string | null, host: string | undefined): boolean {
  if (publicOrigin !== null) return origin === publicOrigin
  return URL.canParse(origin) && new URL(origin).host === host
}

const refused = () => new Refusal('origin', 'This came from a page of another site and was not carried out.')

/** Where people reach the vault: PUBLIC_URL, else the address that this request came to. */
export function originOf({ context, node: { req } }: H3Event): string {
  const { publicOrigin } = context.server
  if (publicOrigin !== null) return publicOrigin
  return req.headers.host === undefined ? '' : `http://${req.headers.host}`
}
