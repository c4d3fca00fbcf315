import { getCookie, type H3Event } from 'h3'
import type { PersonActor } from '#server/database/actor'
import { beginSession, endSession, findSession } from '#server/services/people/sessions'

/*
 * The only file that touches the sealed cookie. It holds nothing but a random id; who that is, and whether it still holds,
 * the sessions table says on every request, so that ending one holds at once.
 */

declare module '#auth-utils' {
  interface SecureSessionData { sid: string }
}

export const peerOf = (event: H3Event): string => event.node.req.socket.remoteAddress ?? ''

/** As nuxt.config names it (runtimeConfig.session.name). */
const cookieName = 'witnessmark'

/** Ids by the sealed cookie: opening the seal costs more than the rest of a request, and says nothing about whether the id still holds. */
const opened = new Map<string, string>()
const mostOpened = 1000

async function sessionId(event: H3Event): Promise<string | null> {
  const sealed = getCookie(event, cookieName)
  if (sealed === undefined || sealed === '') return null
  const known = opened.get(sealed)
  if (known !== undefined) return known
  const { secure } = await getUserSession(event)
  if (secure === undefined) return null
  const [oldest] = opened.keys()
  if (opened.size >= mostOpened && oldest !== undefined) opened.delete(oldest)
  opened.set(sealed, secure.sid)
  return secure.sid
}

/** The person of the request's cookie, or null. Without a cookie none is set. */
export async function sessionActor(event: H3Event): Promise<PersonActor | null> {
  const sid = await sessionId(event)
  return sid === null ? null : findSession(event.context.server.vault, sid, peerOf(event))
}

/** A new session under a new id, whatever cookie came with the request. */
export async function openSession(event: H3Event, personId: number, panel: boolean): Promise<void> {
  const sid = beginSession(event.context.server.vault, personId, panel, peerOf(event))
  await replaceUserSession(event, { secure: { sid } })
}

export async function closeSession(event: H3Event, actor: PersonActor): Promise<void> {
  if (actor.session !== null) endSession(event.context.server.vault, actor.session)
  await clearUserSession(event)
}
