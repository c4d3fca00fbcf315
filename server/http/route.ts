import { defineEventHandler, getRouterParams, type H3Event } from 'h3'
import type { z } from 'zod'
import { routes, type RouteDeclaration, type RouteName } from '#shared/api/routes'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor, TokenActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { assertMay, findActor } from './actor'
import { Answer, FileAnswer, StreamAnswer } from './answer'
import { fingerprintOf, runOnce, type KeyedRequest } from './idempotency'
import { checked, queryOf } from './input'
import { readJsonBody } from './json-body'
import { assertOrigin } from './origin'
import { sendAnswer, sendProblem } from './respond'
import { findSubject, type Subject } from './scope'
import { assertSigned } from './signature'

/*
 * Every route is one `defineRoute('POST /api/…', handler)`. The wrapper does, in this order: origin, actor (401), role or
 * token scope (403), input (422), scope (404), signature (403); then the handler; then the answer or the problem.
 *
 * A handler that stores answers by `return once(() => service(vault, actor, input))`. `once` is one IMMEDIATE transaction
 * that holds whatever the services write, their log entries, and the answer under the request's Idempotency-Key; it is
 * synchronous, so awaiting comes before it. A plain value goes out with the table's only 2xx status; where there are
 * several, the handler says which: `answer(201, body)`. A refusal thrown inside stores nothing; a problem that *did* store
 * (a file kept in the tray) is answered, not thrown: `answer(422, problem)`.
 *
 * Routes with `body: 'file'` read it themselves before `once`, and hand over its digest, since the wrapper never saw it:
 *
 *   export default defineRoute('POST /api/uploads', async ({ input, actor, vault, event, once }) => {
 *     const body = await readFileBody(event.node.req)
 *     return once(() => storeUpload(vault, actor, body, input.query), body.digest)
 *   })
 */

type Declared<Name extends RouteName> = (typeof routes)[Name]
type Part<Name extends RouteName, Key extends string> = Declared<Name> extends Record<Key, infer Schema> ? Schema extends z.ZodType ? z.output<Schema> : undefined : undefined
type BodyOf<Name extends RouteName> = Declared<Name> extends { sign: true } ? Omit<Part<Name, 'body'>, 'password'> : Part<Name, 'body'>
type ActorOf<Name extends RouteName> = Declared<Name> extends { may: 'anyone' } ? null : Declared<Name> extends { token: string } ? PersonActor | TokenActor : PersonActor
type SubjectOf<Name extends RouteName> = Declared<Name> extends { scope: string } ? Subject : null
type Values<Schemas> = { [Status in keyof Schemas]: Schemas[Status] extends z.ZodType ? z.input<Schemas[Status]> : FileAnswer }[keyof Schemas]
/** What a handler of the route may answer. */
export type AnswerOf<Name extends RouteName> = Values<Declared<Name>['answers']> | Answer | FileAnswer | StreamAnswer

export interface RouteContext<Name extends RouteName> {
  readonly input: { readonly params: Part<Name, 'params'>, readonly query: Part<Name, 'query'>, readonly body: BodyOf<Name> }
  /** null only where anyone may call. */
  readonly actor: ActorOf<Name>
  /** What params.id names where the route has a scope: its number, also where it came as `tag:…`, and its site. */
  readonly subject: SubjectOf<Name>
  readonly vault: Vault
  readonly event: H3Event
  readonly once: (work: (write: Write) => Exclude<AnswerOf<Name>, StreamAnswer>, bodyDigest?: string) => Answer | FileAnswer
}

export type RouteHandler<Name extends RouteName> = (context: RouteContext<Name>) => AnswerOf<Name> | Promise<AnswerOf<Name>>

/** They begin or end a session or write nothing; a repeated call does no harm. */
const withoutOnce: ReadonlySet<RouteName> = new Set(['POST /api/set-up', 'POST /api/sign-in', 'POST /api/sign-out', 'POST /api/uploads/preview'])

export function defineRoute<Name extends RouteName>(name: Name, handler: RouteHandler<Name>) {
  const declaration: RouteDeclaration = routes[name]
  return defineEventHandler(async (event) => {
    try {
      const request = await admit(event, declaration)
      const once = keeper(event, name, request)
      const given = await handler({ ...request, vault: event.context.server.vault, event, once } as unknown as RouteContext<Name>)
      if (name.startsWith('POST ') && !withoutOnce.has(name) && !once.used()) throw new TypeError(`${name} answered without once().`)
      return await sendAnswer(event, given instanceof StreamAnswer ? given : asAnswer(declaration, given))
    }
    catch (error) {
      return sendProblem(event, error)
    }
  })
}

interface Admitted {
  readonly actor: PersonActor | TokenActor | null
  readonly input: { params: unknown, query: unknown, body: unknown }
  readonly subject: Subject | null
  readonly text: string
}

async function admit(event: H3Event, declaration: RouteDeclaration): Promise<Admitted> {
  const { vault, publicOrigin } = event.context.server
  assertOrigin(event.node.req, publicOrigin)
  const actor = declaration.may === 'anyone' ? null : await findActor(event)
  if (declaration.may !== 'anyone') assertMay(declaration, actor)
  const { text, ...input } = await readInput(event, declaration)
  const subject = actor === null || declaration.scope === undefined ? null : findSubject(vault, actor, declaration.scope, (input.params as { id: number | string }).id)
  if (actor !== null && declaration.sign === true) input.body = await assertSigned(vault, actor, input.body)
  return { actor, input, subject, text }
}

async function readInput(event: H3Event, { params, query, body }: RouteDeclaration) {
  const sent = queryOf(event.node.req.url ?? '')
  const input = {
    params: params && checked(params, getRouterParams(event, { decode: true }), 'params'),
    query: query && checked(query, sent, 'query'),
    body: undefined as unknown,
    text: '',
  }
  const [unknown] = Object.keys(sent)
  if (query === undefined && unknown !== undefined) throw new Refusal('input', `?${unknown}: not known here`, { errors: [{ at: `?${unknown}`, code: 'unrecognized-keys', message: 'not known here' }] })
  if (body === undefined || typeof body === 'string') return input
  const { text, value } = await readJsonBody(event.node.req)
  return { ...input, text, body: checked(body, value, 'body') }
}

function keeper(event: H3Event, name: RouteName, { actor, text }: Admitted) {
  const { vault, secret } = event.context.server
  let used = false
  const once = (work: (write: Write) => unknown, bodyDigest: string = text) => {
    used = true
    if (actor === null) throw new TypeError(`${name} has no actor to store for.`)
    const kept = runOnce(vault, secret, actor, keyed(event, name, secret, bodyDigest), write => asAnswer(routes[name], work(write)))
    if (kept.replayed) event.node.res.setHeader('Idempotency-Replayed', 'true')
    return kept.answer
  }
  return Object.assign(once, { used: () => used })
}

function keyed(event: H3Event, name: RouteName, secret: string, body: string): KeyedRequest | null {
  const { headers, method = '', url = '' } = event.node.req
  const key = headers['idempotency-key']
  if (typeof key !== 'string' || !name.startsWith('POST ')) return null
  if (key.length < 1 || key.length > 200) throw new Refusal('input', 'Idempotency-Key: 1 to 200 characters.')
  return { key, route: name, fingerprint: fingerprintOf(secret, method, url, body) }
}

function asAnswer(declaration: RouteDeclaration, given: unknown): Answer | FileAnswer {
  if (given instanceof Answer || given instanceof FileAnswer) return given
  const [status] = Object.keys(declaration.answers).map(Number).filter(each => each < 300)
  return new Answer(status ?? 200, given)
}
