import { StartError } from '#server/database/start-error'

/** Origin of PUBLIC_URL; null where it is not set. Throws where it is no web address. */
export function publicOriginOf(url: string | undefined): string | null {
  if (url === undefined || url === '') return null
  const parsed = URL.canParse(url) ? new URL(url) : null
  if (parsed === null || !/^https?:$/.test(parsed.protocol)) throw new StartError('public-url', `PUBLIC_URL is ${url}, which is no web address. Give the address people use, such as https://marks.example.`)
  return parsed.origin
}
