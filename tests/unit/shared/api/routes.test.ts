import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { routes, type RouteDeclaration, type RouteName } from '../../../../shared/api/routes'

/*
 * Who may do what, written down a second time by hand. The route table decides it at run time; a role, a token or a bound
 * that changes there by mistake is a door left open, so it has to be changed here on purpose as well.
 * Roles: t technician, p planner, a auditor, A administrator. Token: a script's scope. Bound: whose site must be the caller's.
 */
const doors = `
  GET /api/health                        | anyone    |        |         |
  GET /api/openapi.json                  | anyone    |        |         |
  GET /api/format/schema.json            | anyone    |        |         |
  POST /api/set-up                       | anyone    |        |         |
  POST /api/sign-in                      | anyone    |        |         |
  POST /api/sign-out                     | signed-in |        |         |
  GET /api/me                            | signed-in | read   |         |
  POST /api/me/password                  | signed-in |        |         |
  GET /api/me/letters                    | signed-in |        |         |
  POST /api/me/letters                   | signed-in |        |         |
  POST /api/me/watches                   | signed-in |        |         |
  GET /api/people                        | A         |        |         |
  POST /api/people                       | A         |        |         |
  PATCH /api/people/:id                  | A         |        |         |
  GET /api/people/names                  | tp        |        |         |
  GET /api/tokens                        | A         |        |         |
  POST /api/tokens                       | A         |        |         |
  POST /api/tokens/:id/end               | A         |        |         |
  GET /api/letters                       | A         |        |         |
  GET /api/letters/:id                   | A         |        |         |
  GET /api/letters/:id/file              | A         |        |         |
  POST /api/letters/:id/send-again       | A         |        |         |
  GET /api/sites                         | tpaA      | read   |         |
  POST /api/sites                        | p         |        |         |
  GET /api/sites/:id                     | tpaA      | read   | site    |
  PATCH /api/sites/:id                   | p         |        | site    |
  GET /api/lines                         | tpaA      | read   |         |
  POST /api/lines                        | p         |        |         |
  GET /api/lines/:id                     | tpaA      | read   | line    |
  PATCH /api/lines/:id                   | p         |        | line    |
  GET /api/lines/:id/folder              | tpaA      | read   | line    |
  GET /api/line-folders                  | tpaA      | read   |         |
  GET /api/machines                      | tpaA      | read   |         |
  POST /api/machines                     | p         |        |         |
  GET /api/machines/:id                  | tpaA      | read   | machine |
  GET /api/machines/:id/neighbours       | tpaA      | read   | machine |
  PATCH /api/machines/:id                | p         |        | machine |
  GET /api/axes                          | tpaA      | read   |         |
  POST /api/axes                         | p         |        |         |
  GET /api/axes/:id                      | tpaA      | read   | axis    |
  PATCH /api/axes/:id                    | p         |        | axis    |
  GET /api/axes/:id/versions             | tpaA      | read   | axis    |
  GET /api/axes/:id/versions/:number     | tpaA      | read   | axis    |
  GET /api/axes/:id/life                 | tpaA      | read   | axis    |
  GET /api/axes/:id/as-of                | tpaA      | read   | axis    |
  GET /api/axes/:id/values               | tpaA      | read   | axis    |
  GET /api/axes/:id/fittings             | tpaA      | read   | axis    |
  POST /api/axes/:id/known-good/none     | p         |        | axis    | signed
  POST /api/axes/:id/kit                 | tp        |        | axis    |
  GET /api/axes/:id/label                | tpaA      | read   | axis    |
  POST /api/axes/:id/label               | tp        |        | axis    |
  GET /api/units                         | tpaA      | read   |         |
  POST /api/units                        | p         |        |         |
  GET /api/units/:id                     | tpaA      | read   | unit    |
  PATCH /api/units/:id                   | p         |        | unit    |
  POST /api/fittings                     | p         |        |         |
  POST /api/fittings/:id/end             | p         |        | fitting |
  GET /api/nameplates                    | tpaA      | read   |         |
  POST /api/nameplates                   | p         |        |         |
  GET /api/nameplates/:id                | tpaA      | read   |         |
  PATCH /api/nameplates/:id              | p         |        |         |
  GET /api/nameplates/:id/revisions      | tpaA      | read   |         |
  GET /api/rules                         | tpaA      | read   |         |
  POST /api/rules                        | p         |        |         |
  POST /api/rules/:id/end                | p         |        | rule    |
  POST /api/waivers                      | p         |        |         | signed
  GET /api/axes/:id/waivers              | tpaA      | read   | axis    |
  POST /api/waivers/:id/end              | p         |        | waiver  | signed
  POST /api/judging-runs                 | p         |        |         |
  GET /api/judging-runs/:id              | p         |        |         |
  GET /api/judging-context               | tpaA      | read   |         |
  POST /api/uploads/preview              | tp        | upload |         |
  POST /api/uploads                      | tp        | upload |         |
  GET /api/tray                          | tp        |        |         |
  GET /api/tray/:id/file                 | tp        |        | tray    |
  POST /api/tray/:id/assign              | tp        |        | tray    |
  POST /api/tray/:id/discard             | tp        |        | tray    |
  GET /api/versions/:id                  | tpaA      | read   | version |
  GET /api/versions/:id/file             | tpaA      | read   | version |
  GET /api/versions/:id/changes          | tpaA      | read   | version |
  GET /api/versions/:id/attachments      | tpaA      | read   | version |
  POST /api/versions/:id/attachments     | tp        | upload | version |
  GET /api/attachments/:id/file          | tpaA      | read   | attachment |
  POST /api/versions/:id/known-good      | p         |        | version | signed
  POST /api/versions/:id/void            | p         |        | version | signed
  POST /api/versions/:id/judge           | p         |        | version |
  GET /api/findings                      | tpaA      | read   |         |
  GET /api/findings/:id                  | tpaA      | read   | finding |
  POST /api/findings/:id/explain         | tpa       |        | finding |
  POST /api/findings/:id/close           | pa        |        | finding | signed
  POST /api/findings/:id/reopen          | pa        |        | finding |
  GET /api/planned-changes               | tpaA      | read   |         |
  POST /api/planned-changes              | p         |        |         |
  GET /api/planned-changes/:id           | tpaA      | read   |         |
  POST /api/planned-changes/:id/end      | p         |        |         |
  GET /api/swaps                         | tpaA      | read   |         |
  POST /api/swaps                        | tp        |        |         |
  GET /api/swaps/:id                     | tpaA      | read   | swap    |
  GET /api/swaps/:id/spares              | tpaA      | read   | swap    |
  GET /api/swaps/:id/kit                 | tp        |        | swap    |
  POST /api/swaps/:id/source             | tp        |        | swap    |
  POST /api/swaps/:id/unit-in            | tp        |        | swap    |
  POST /api/swaps/:id/cautions           | tp        |        | swap    |
  POST /api/swaps/:id/ticks              | tp        |        | swap    |
  POST /api/swaps/:id/safe               | tp        |        | swap    |
  POST /api/swaps/:id/read-back          | tp        |        | swap    |
  POST /api/swaps/:id/missing-keys       | tp        |        | swap    |
  POST /api/swaps/:id/first-motion       | tp        |        | swap    |
  POST /api/swaps/:id/note               | tp        |        | swap    |
  POST /api/swaps/:id/running            | tp        |        | swap    |
  POST /api/swaps/:id/release            | p         |        | swap    | signed
  POST /api/swaps/:id/abandon            | tp        |        | swap    |
  POST /api/swaps/:id/put-back           | tp        |        | swap    |
  GET /api/history                       | tpaA      | read   |         |
  GET /api/history/acts                  | paA       | read   |         |
  GET /api/history/rests                 | tpaA      | read   |         |
  GET /api/history/not-read              | tpaA      | read   |         |
  GET /api/reports                       | pa        | read   |         |
  POST /api/reports                      | pa        |        |         |
  GET /api/reports/:id                   | pa        | read   |         |
  GET /api/reports/:id/file              | pa        | read   |         |
  GET /api/board                         | tpaA      | read   |         |
  GET /api/log                           | paA       | read   |         |
  GET /api/log/key                       | paA       | read   |         |
  GET /api/log/checkpoint                | paA       | read   |         |
  GET /api/log/file                      | paA       | read   |         |
  GET /api/log/proof                     | paA       | read   |         |
  GET /api/log/consistency               | paA       | read   |         |
  GET /api/trail                         | paA       |        |         |
  POST /api/trail/verifications          | aA        |        |         |
`.trim().split('\n').map(line => line.split('|').map(cell => cell.trim()))

const letters = { technician: 't', planner: 'p', auditor: 'a', admin: 'A' } as const
const declared = Object.entries(routes) as [RouteName, RouteDeclaration][]
const doorOf = ([name, { may, token, scope, sign }]: [RouteName, RouteDeclaration]) =>
  [name, typeof may === 'string' ? may : may.map(role => letters[role]).join(''), token ?? '', scope ?? '', sign ? 'signed' : '']
const methodOf = (name: string) => name.split(' ')[0]
const takesUnknown = (schema: unknown) => schema instanceof z.ZodObject && schema.safeParse({ anything: 1 }).success

describe('the doors', () => {
  it('are these, in this order, with these keys to them', () => {
    expect(declared.map(doorOf)).toEqual(doors.map(([name = '', may = '', token = '', scope = '', signed = '']) => [name, may, token, scope, signed]))
  })

  it('let an auditor read, work on findings, ask for reports, have the vault verified, and nothing else', () => {
    const auditors = declared.filter(([, { may }]) => Array.isArray(may) && may.includes('auditor'))
    expect(auditors.map(([name]) => name).filter(name => methodOf(name) !== 'GET')).toEqual([...['explain', 'close', 'reopen'].map(act => `POST /api/findings/:id/${act}`), 'POST /api/reports', 'POST /api/trail/verifications'])
  })

  it('let a script read or upload, never sign, register or change', () => {
    for (const [name, { token, sign }] of declared) {
      if (token === 'read') expect(methodOf(name), name).toBe('GET')
      if (token === 'upload') expect(name).toMatch(/^POST \/api\/(uploads|versions\/:id\/attachments)/)
      if (token) expect(sign, name).toBeUndefined()
    }
  })

  it('that are signed are for planners, a finding for auditors too, and take the password again', () => {
    for (const [name, { sign, may, body }] of declared.filter(([, route]) => route.sign)) {
      expect([sign, may], name).toEqual([true, name.startsWith('POST /api/findings') ? ['planner', 'auditor'] : ['planner']])
      expect(body instanceof z.ZodObject && Object.keys(body.shape)).toContain('password')
    }
  })

  it('keep people, tokens and other people’s letters to administrators', () => {
    for (const [name, { may }] of declared) if (!name.includes('/me/') && /\/(people|tokens|letters)(\/:id|$)/.test(name)) expect(may, name).toEqual(['admin'])
  })
})

describe('what goes in', () => {
  it('has parameters exactly where the address has', () => {
    for (const [name, { params }] of declared) {
      const named = [...name.matchAll(/:(\w+)/g)].map(match => match[1])
      expect(params instanceof z.ZodObject ? Object.keys(params.shape) : [], name).toEqual(named)
    }
  })

  it('of a bound is found from the id in the address', () => {
    for (const [name, { scope }] of declared) if (scope) expect(name, scope).toMatch(/^[A-Z]+ \/api\/\w+\/:id/)
  })

  it('is a body where something is written, and never one where something is read', () => {
    const bare = ['POST /api/sign-out', 'POST /api/letters/:id/send-again', 'POST /api/tokens/:id/end', 'POST /api/judging-runs', 'POST /api/versions/:id/judge', 'POST /api/trail/verifications']
    for (const [name, { body }] of declared) expect(body !== undefined, name).toBe(methodOf(name) !== 'GET' && !bare.includes(name))
  })

  it('is refused where it has a key that nobody knows: a misspelt one would be silently without effect', () => {
    for (const [name, { body, query, params }] of declared) for (const part of [body, query, params]) expect(takesUnknown(part), name).toBe(false)
  })

  it('may be changed only with the rev that was read', () => {
    for (const [name, { body }] of declared.filter(([each]) => methodOf(each) === 'PATCH')) expect(body instanceof z.ZodObject && Object.keys(body.shape), name).toContain('rev')
  })
})

describe('what comes out', () => {
  it('is 201 with its id where something is registered', () => {
    for (const [name, { answers }] of declared) {
      if (!(201 in answers) || /uploads|tray|judge$/.test(name)) continue
      const schema = answers[201]
      expect(schema instanceof z.ZodObject && Object.keys(schema.shape), name).toContain('id')
    }
  })

  it('of a list is a page with a cursor, or all of a short list', () => {
    for (const [name, { answers, query }] of declared) {
      const schema = answers[200]
      if (!(schema instanceof z.ZodObject) || !('items' in schema.shape)) continue
      expect('next' in schema.shape, name).toBe(query !== undefined)
    }
  })

  it('never holds a password, a hash of one, or the secret of a token, the making of it aside', () => {
    for (const [name, { answers }] of declared) {
      const text = Object.values(answers).filter(each => each instanceof z.ZodObject).map(each => JSON.stringify(z.toJSONSchema(each, { unrepresentable: 'any' }))).join()
      expect(text, name).not.toMatch(/"(password|passwordHash|secret)"/)
      expect(/"token"/.test(text), name).toBe(name === 'POST /api/tokens')
    }
  })

  it('is said in one sentence each, for the page about the interface', () => {
    for (const [name, { says }] of declared) expect(says, name).toMatch(/^\S.+\.$/)
  })
})
