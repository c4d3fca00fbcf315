import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { routes, type RouteDeclaration } from '../../../../shared/api/routes'
import { casesOf, type Bound } from '../../../support/border-values'

/*
 * What each route takes, written down a second time by hand: every field of every body and query (marked ?) with its least
 * and greatest. A bound that moves by mistake lets in what a page cannot show or a table cannot hold, or turns away what
 * scripts have always sent. `more` is told elsewhere. limit and cursor are the same everywhere and have tests of their own.
 */
const table = `
  POST /api/set-up
    token text 1 200 | name text 1 80 | email email | password text 1 256 | plant? text 1 80
  POST /api/sign-in
    email text 3 254 | password text 1 256 | panel? flag
  POST /api/me/password
    current text 1 256 | password text 1 256
  POST /api/me/letters
    kind one swap-unreleased/swap-released/unfit-gone-on/watched-change/finding-opened/finding-overdue/overdue-digest/checkpoint/verification-failed/copy-failed | wanted flag
  POST /api/me/watches
    scope one site/line/machine/axis | scopeId id | watched flag
  POST /api/people
    name text 1 80 | email email | roles list 1 4 of one technician/planner/auditor/admin | siteIds list 0 1000 of id | shared? flag | password? text 1 256
  PATCH /api/people/:id
    rev? whole - - | name? text 1 80 | email? email | roles? list 1 4 of one technician/planner/auditor/admin | siteIds? list 0 1000 of id | shared? flag | password? text 1 256 | ended? flag
  POST /api/tokens
    name text 1 80 | scopes list 1 2 of one upload/read | siteIds list 0 1000 of id | endsAt time | ownerId? id
  GET /api/letters ?
    state? one queued/sent/failed/dropped
  POST /api/sites
    name text 1 80 | timeZone text 1 64
  PATCH /api/sites/:id
    rev? whole - - | name? text 1 80 | timeZone? text 1 64 | fourEyes? flag | releaseHours? whole 1 720 | knownGoodMonths? whole 1 120 | watched? list 0 200 of text 0 80
    attachmentWanted? flag | labelWanted? flag | paper? one A4/Letter
  GET /api/lines ?
    siteId? id | lineId? id | machineId? id
  POST /api/lines
    siteId id | name text 1 80
  PATCH /api/lines/:id
    rev? whole - - | name? text 1 80 | siteId? id
  GET /api/lines/:id/folder ?
    kept? one true
  GET /api/machines ?
    siteId? id | lineId? id | machineId? id
  POST /api/machines
    lineId id | name text 1 80 | controllerScanMs? number >0 60000 or null
  PATCH /api/machines/:id
    rev? whole - - | name? text 1 80 | lineId? id | controllerScanMs? number >0 60000 or null
  GET /api/axes ?
    siteId? id | lineId? id | machineId? id
  POST /api/axes
    machineId id | tag tag | axisKind one linear/rotary | role? text 0 80 | flags? list 0 3 of one gravity/press/collision | bus? text 0 80 | uploadEveryHours? whole 1 8760 or null
    duty? more
  PATCH /api/axes/:id
    rev? whole - - | machineId? id | tag? tag | role? text 0 80 | flags? list 0 3 of one gravity/press/collision | bus? text 0 80 | uploadEveryHours? whole 1 8760 or null
    duty? more
  GET /api/axes/:id/as-of ?
    at time
  GET /api/axes/:id/values ?
    section? one setup/move/zone/extra | field text 1 80 | row? whole 0 65535
  POST /api/axes/:id/known-good/none
    meaning one reviewed/approved/responsibility | note? text 0 2000 | password text 1 256
  POST /api/axes/:id/kit
    serial? text 0 64 | form one json/csv/entry/pdf/zip | paper? one A4/Letter | cautionsRead flag
  GET /api/axes/:id/label ?
    form? one json/pdf | size? one 100x50/50x25 | machine? one true
  POST /api/axes/:id/label
    size one 100x50/50x25
  GET /api/units ?
    search? text 0 80 | state? one spare/fitted/failed/repair/scrapped | model? text 0 64
  POST /api/units
    serial serial | channel? whole 1 64 | model text 1 64 | firmware? text 0 32 | actuatorSerial? text 0 64 | actuatorModel? text 0 64 | location? text 0 200
    state? one spare/fitted/failed/repair/scrapped | siteId? id
  PATCH /api/units/:id
    rev? whole - - | model? text 1 64 | firmware? text 0 32 | actuatorSerial? text 0 64 | actuatorModel? text 0 64 | location? text 0 200 | state? one spare/fitted/failed/repair/scrapped
    siteId? id or null
  POST /api/fittings
    axisId id | unitId id | at time
  POST /api/fittings/:id/end
    at time | unitState one spare/failed/repair/scrapped
  POST /api/nameplates
    model text 1 64 | axisKind one linear/rotary | stroke number >0 - | hardMargin? number 0 - | maxSpeed? number >0 - | maxAcceleration? number >0 -
    ratedThrust? number >0 - | peakThrust? number >0 - | forceBase? one rated-thrust/peak-thrust | pressForceMin? number 0 - | pressForceMax? number >0 -
    maxPressSpeed? number >0 - | forceLimitActsBothWays? flag | stopsAtApproach? flag | maxImpactEnergy? number >0 - | resolution? number >0 -
    shownDigit? number >0 - | truncates? flag | repeatability? number >0 - | lead? number >0 - | gearRatio? number >0 - | efficiency? number >0 1
    movingMass? number 0 - | rotorInertia? number 0 - | maxPayloadLevel? number >0 - | maxPayloadVertical? number >0 - | maxPayloadInertia? number >0 -
    maxMoves? whole 1 1024 | firstMove? whole 0 1 | allOff? one first/none/home | strobe? one edge/level | maxSelectInputs? whole 0 10
    inputFilterTime? number 0 - | inputSwitching? one p/n | outputSwitching? one p/n | brakeFitted? flag | brakeCloseTime? number 0 - | brakeOpenTime? number 0 -
    brakeHolding? number >0 - | maxOverloadTime? number >0 - | encoder? one incremental/absolute/absolute-battery
    homeOffsetSense? one zero-is-home-plus-offset/home-reads-offset | decimals? whole 0 6 | firmwareSeen? list 0 64 of text 1 32 | note? text 0 2000
    dictionary? more | entryTable? more
  POST /api/rules
    scope one site/machine/axis | scopeId id | field text 1 80 | min? number - - | max? number - - | fixed? more | reason text 1 2000
  POST /api/rules/:id/end
    reason text 1 2000
  POST /api/waivers
    axisId id | rule text 1 80 | at list 0 1000 of text 0 200 | value more | reason text 1 2000 | until time | password text 1 256
  POST /api/waivers/:id/end
    reason text 1 2000 | password text 1 256
  GET /api/judging-runs/:id ?
    from? whole 0 -
  GET /api/judging-context ?
    serial text 1 64 | channel? id | capturedAt? time
  POST /api/uploads/preview ?
    occasion? one commissioning/routine/as-found/as-left | reason? text 0 2000 | workOrder? text 0 80 | changedBy? text 0 80 | allowedBy? text 0 80 | together? one yes/no | capturedAt? time
    axis? axis | decimal? one point/comma | layout? text 1 64 | serial? serial | firmware? text 0 32 | name? text 0 255
  POST /api/tray/:id/assign
    axisId id | at? time | reason? text 0 2000
  POST /api/tray/:id/discard
    reason text 1 2000
  GET /api/versions/:id/file ?
    form one json/csv/entry/original
  GET /api/versions/:id/changes ?
    against id | form? one json-patch/text
  POST /api/versions/:id/attachments ?
    kind? one drive-backup/photo/other | name? text 0 255 | note? text 0 400
  POST /api/versions/:id/known-good
    meaning one reviewed/approved/responsibility | note? text 0 2000 | password text 1 256
  POST /api/versions/:id/void
    reason text 1 2000 | password text 1 256
  GET /api/findings ?
    state? one open/explained/closed | axis? axis | site? id | weight? one harm/motion/text
  POST /api/findings/:id/explain
    text text 1 2000 | by? text 1 80 | at? time | workOrder? text 1 80
  POST /api/findings/:id/close
    as one accepted/put-right | allowedBy? text 1 80 | versionId? id | password text 1 256
  POST /api/findings/:id/reopen
    text text 1 2000
  POST /api/planned-changes
    axisIds list 1 1000 of id | fields list 1 100 of text 1 80 | min? number - - | max? number - - | ranges? list 0 100 | ranges[].field text 1 80 | ranges[].min? number - - | ranges[].max? number - - | from time | until time | reason text 1 2000 | allowedBy text 1 80
  POST /api/planned-changes/:id/end
    reason text 1 2000
  GET /api/swaps ?
    open? one true/false | axis? axis
  POST /api/swaps
    axisId id | replaced one unit/drive/actuator | failure text 1 2000 | workOrder? text 0 80 | unitOut.serial serial | unitOut.channel? whole 1 64 | unitOut.model? text 1 64
  GET /api/swaps/:id/kit ?
    speedPercent? number >0 100
  POST /api/swaps/:id/source
    rev? whole 1 - | versionId id | decidedBy text 1 80 | reason text 1 2000
  POST /api/swaps/:id/unit-in
    rev? whole 1 - | serial serial | channel? whole 1 64 | model? text 1 64 | firmware? text 0 32 | actuatorSerial? text 0 64 | actuatorModel? text 0 64 | forcesConfirmed? flag
    unfit.by text 1 80 | unfit.at time | unfit.reason text 1 2000
  POST /api/swaps/:id/cautions
    rev? whole 1 - | read only true
  POST /api/swaps/:id/safe
    rev? whole 1 - | confirmed only true | blocked? one prop/pin/lowered
  POST /api/swaps/:id/read-back ?
    rev? whole 1 - | capturedAt? time | decimal? one point/comma | layout? text 1 64 | firmware? text 0 32 | name? text 0 255
  POST /api/swaps/:id/missing-keys
    rev? whole 1 - | keys list 1 200 of text 1 80 | reason text 1 2000 | allowedBy? text 1 80
  POST /api/swaps/:id/first-motion
    rev? whole 1 - | speedPercent number >0 100 | results list 1 1100 | results[].item text 1 40 | results[].outcome one ok/fault | results[].text? text 0 400
  POST /api/swaps/:id/note
    rev? whole 1 - | note text 0 2000
  POST /api/swaps/:id/running
    rev? whole 1 - | note? text 0 2000
  POST /api/swaps/:id/release
    rev? whole 1 - | meaning one reviewed/approved/responsibility | note? text 0 2000 | oldUnitState? one repair/scrapped/spare | password text 1 256
  POST /api/swaps/:id/abandon
    rev? whole 1 - | reason text 1 2000 | fittedUnitId id or null
  POST /api/swaps/:id/put-back
    rev? whole 1 - | reason text 1 2000 | unitState? one spare/failed/repair/scrapped
  GET /api/history ?
    field? text 1 80 | section? one file/setup/zone/move/extra | row? whole 0 65535 | axis? axis | machine? id | line? id | site? id | unit? id | from? time | to? time | by? text 1 80
    weight? one harm/motion/text | form? one json/csv/pdf
  GET /api/history/acts ?
    kind one settings/places/nameplates/rules/people/marks | from? time | to? time
  GET /api/history/not-read ?
    axis? axis | machine? id | line? id | site? id | from? time | to? time
  GET /api/reports ?
    scope? one site/line/machine/axis | scopeId? id
  POST /api/reports
    scope? more | scopeId? more | from? time | to? time | paper? one A4/Letter
  GET /api/reports/:id/file ?
    form? one pdf/json | paper? one A4/Letter
  GET /api/history/rests ?
    axis? axis | machine? id | line? id | site? id | from? time | to? time
  GET /api/log/proof ?
    entry whole 0 - | size? whole 0 -
  GET /api/log/consistency ?
    from whole 0 - | to? whole 0 -
`.trim().split(/\n {2}(?=[A-Z])/).map(block => block.trim().split('\n'))

interface Taking { readonly route: string, readonly inQuery: boolean, readonly bounds: readonly Bound[] }

function boundOf(cell: string): Bound {
  const nullable = cell.endsWith(' or null')
  const [name = '', kind = '', ...args] = cell.replace(/ or null$/, '').trim().split(' ')
  return { path: name.replace('?', ''), optional: name.endsWith('?'), nullable, kind, args }
}
const takings: Taking[] = table.map(([head = '', ...lines]) => {
  return { route: head.replace(/ \?$/, ''), inQuery: head.endsWith(' ?'), bounds: lines.flatMap(line => line.trim().split(' | ').map(boundOf)) }
})

const parentOf = (path: string) => path.split('.').slice(0, -1).join('.').replace('[]', '')
/** Puts a value at `a`, `a.b` or `a[].b`. */
function put(body: Record<string, unknown>, path: string, value: unknown): Record<string, unknown> {
  const [name = '', ...below] = path.split('.')
  const key = name.replace('[]', '')
  if (below.length === 0) return { ...body, [key]: value }
  const inner = name.endsWith('[]') ? (body[key] as Record<string, unknown>[] | undefined)?.[0] : body[key]
  const filled = put(inner as Record<string, unknown> ?? {}, below.join('.'), value)
  return { ...body, [key]: name.endsWith('[]') ? [filled] : filled }
}
/** A value of its kind for each field that is needed, those beside the field that is looked at too. */
function bodyFor({ bounds, route }: Taking, looked: Bound): Record<string, unknown> {
  const needed = bounds.filter(({ path, optional, kind }) => !optional && kind !== 'more' && (parentOf(path) === '' || parentOf(path) === parentOf(looked.path) || path.includes('[]')))
  const start = route === 'POST /api/waivers' ? { value: { level: 'unknown', missing: [] } } : {}
  return needed.filter(({ kind, args }) => kind !== 'list' || args.length > 2).reduce((body, bound) => put(body, bound.path, casesOf(bound).taken.at(-1)), start as Record<string, unknown>)
}

const placed = takings.flatMap(taking => taking.bounds.filter(({ kind }) => kind !== 'more').map(bound => ({ taking, bound, name: `${taking.route} ${bound.path}` })))

describe.each(placed)('$name', ({ taking, bound }) => {
  const { body, query }: RouteDeclaration = routes[taking.route as keyof typeof routes]
  const schema = (taking.inQuery ? query : body) as z.ZodObject
  const asSent = (value: unknown) => taking.inQuery && typeof value === 'number' ? String(value) : value
  const sent = (value: unknown) => put(bodyFor(taking, bound), bound.path, asSent(value))
  const { taken, refused } = casesOf(bound)

  it('is taken up to its borders, and refused beyond them with its place named', () => {
    for (const value of taken) expect(schema.safeParse(sent(value)).error?.issues ?? [], `takes ${JSON.stringify(asSent(value)).slice(0, 80)}`).toEqual([])
    const alien = taking.inQuery ? [] : [{ no: 'such' }, ...bound.nullable ? [] : [null]]
    for (const value of [...refused, ...alien]) {
      const places = schema.safeParse(sent(value)).error?.issues.map(({ path }) => path.map(step => typeof step === 'number' ? '[]' : String(step)).join('.').replaceAll('.[]', '[]')) ?? []
      expect(places.length, `refuses ${JSON.stringify(value)?.slice(0, 80)}`).toBeGreaterThan(0)
      for (const place of places) expect(place.startsWith(bound.path)).toBe(true)
    }
  })

  it(bound.optional ? 'may be left out' : 'has to be there', () => {
    const { [bound.path]: _gone, ...rest } = bodyFor(taking, bound)
    if (!bound.path.includes('.')) expect(schema.safeParse(rest).success).toBe(bound.optional)
    if (bound.nullable) expect(schema.safeParse(sent(null)).success).toBe(true)
  })
})

describe('the table above', () => {
  interface Json { readonly type?: string, readonly properties?: Readonly<Record<string, Json>>, readonly items?: Json }
  const fieldsOf = (json: Json, path = ''): string[] => Object.entries(json.properties ?? {}).flatMap(([key, inner]) => {
    const here = path === '' ? key : `${path}.${key}`
    if (inner.type === 'object' && inner.properties) return fieldsOf(inner, here)
    return inner.items?.properties ? [here, ...fieldsOf(inner.items, `${here}[]`)] : [here]
  })
  const declared = Object.entries(routes) as [string, RouteDeclaration][]

  it('has every field of every route, and no other; what a nameplate’s list holds has tests of its own', () => {
    for (const [route, { body, query }] of declared) for (const [schema, inQuery] of [[body, false], [query, true]] as const) {
      if (!(schema instanceof z.ZodObject) || route === 'PATCH /api/nameplates/:id') continue
      const paged = 'cursor' in schema.shape ? ['limit', 'cursor'] : []
      const fields = fieldsOf(z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Json).filter(path => !path.startsWith('entryTable.')).filter(path => !paged.includes(path))
      const written = takings.find(taking => taking.inQuery === inQuery && (taking.route === route || (route === 'POST /api/uploads' && taking.route === 'POST /api/uploads/preview')))?.bounds.map(({ path }) => path) ?? []
      expect(fields.filter(path => path !== 'entryTable').sort(), route).toEqual(written.filter(path => path !== 'entryTable').sort())
    }
  })

  it('a nameplate is changed within the bounds that it is registered with, and null takes a value away', () => {
    const patch = routes['PATCH /api/nameplates/:id'].body
    for (const { bound, taking } of placed.filter(({ taking }) => taking.route === 'POST /api/nameplates')) {
      const { taken, refused } = casesOf(bound)
      for (const value of [...taken, null]) expect(patch.safeParse({ rev: 1, [bound.path]: value }).success, `${taking.route} ${bound.path}`).toBe(true)
      for (const value of refused) expect(patch.safeParse({ rev: 1, [bound.path]: value }).success, `${taking.route} ${bound.path}`).toBe(false)
    }
  })
})
