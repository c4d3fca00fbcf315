import fc from 'fast-check'
import { setupField, setupFieldNames } from '../../shared/settings/fields'
import type { AxisKind, Content, ExtraValue, Move, Setup, Zone } from '../../shared/settings/types'

/*
 * Contents that the format allows: canonical numbers, rows sorted by number, absent keys left out, and no field where the
 * format refuses it. Hard cases (touching texts, odd keys, one value twice) come up often on purpose.
 */

/** A whole number of millionths between two bounds, small and round values more often than others. */
export function canonicalNumber(min: number, max: number): fc.Arbitrary<number> {
  const millionths = { min: Math.ceil(min * 1e6), max: Math.floor(max * 1e6) }
  const whole = { min: Math.ceil(Math.max(min, -500)), max: Math.floor(Math.min(max, 500)) }
  const fine = fc.maxSafeInteger().map((n) => {
    const span = millionths.max - millionths.min + 1
    return (millionths.min + ((n % span) + span) % span) / 1e6
  })
  return whole.min <= whole.max ? fc.oneof({ weight: 3, arbitrary: fc.integer(whole) }, { weight: 1, arbitrary: fine }) : fine
}

const position = canonicalNumber(-1e9, 1e9)
const aboveZero = canonicalNumber(1e-6, 1e9)
const zeroUp = canonicalNumber(0, 1e9)

/** NFC text of 1 to `most` code points, without control characters, with what trips CSV and JSON Pointer. */
export function plainText(most: number): fc.Arbitrary<string> {
  const unit = fc.constantFrom(...'abzAZ09 ,;"\'=+-@~/#%.:äßé°²·≤－日😀')
  return fc.string({ unit, minLength: 1, maxLength: Math.min(most, 12) }).map(text => text.normalize('NFC'))
}

/** The drive's own double, as far as its shortest text stays within the format's 40 characters and exponents. */
export const ownNumber: fc.Arbitrary<number> = fc.oneof(
  fc.integer({ min: -1000, max: 1000 }),
  fc.double({ min: -1e30, max: 1e30, noNaN: true, noDefaultInfinity: true }).filter(x => x === 0 || Math.abs(x) >= 1e-30),
).map(x => x + 0)

const extraValue: fc.Arbitrary<ExtraValue> = fc.oneof(
  ownNumber, fc.boolean(), plainText(256), fc.constantFrom('', '007', 'true', '=1+1', '-12'),
  fc.record({ value: ownNumber, unit: fc.constantFrom('counts', 'A', 'Ω') }),
)
const extraKey = fc.oneof(
  fc.constantFrom('K-017', 'Filter', '101', 'a/b', 'm~n', 'K~1', 'constructor', 'toString'), plainText(64),
).filter(key => key.trim() === key && key !== '' && key !== '__proto__')

export const arbitraryExtra: fc.Arbitrary<Record<string, ExtraValue>> = fc.dictionary(extraKey, extraValue, { maxKeys: 5, noNullPrototype: true })

function setupValue(name: (typeof setupFieldNames)[number], kind: AxisKind): fc.Arbitrary<unknown> | undefined {
  const field = setupField(name)!
  if (field.type === 'flag') return fc.boolean()
  if (field.type === 'choice') return fc.constantFrom(...field.choices[kind])
  if (field.unit[kind] === null) return undefined
  if (field.driveOwn) return ownNumber
  if (field.whole) return fc.integer({ min: field.min ?? 0, max: field.max ?? 1000 })
  return field.above === 0 ? aboveZero : canonicalNumber(field.min ?? -1e9, field.max ?? 1e9)
}

export function arbitrarySetup(kind: AxisKind): fc.Arbitrary<Setup> {
  const model: Record<string, fc.Arbitrary<unknown>> = {}
  for (const name of setupFieldNames) {
    const value = setupValue(name, kind)
    if (value) model[name] = value
  }
  // Without the pick nearly every setup would hold about half of the fields; short ones matter as much.
  return fc.tuple(fc.record(model), fc.subarray(Object.keys(model))).map(([all, kept]) =>
    Object.fromEntries(kept.map(name => [name, all[name]])) as Setup)
}

/** A row without its number; a few values only where rows ought to resemble each other. */
export function arbitraryMoveBody(modulo: boolean, alike = false): fc.Arbitrary<Omit<Move, 'move'>> {
  const pick = (wide: fc.Arbitrary<number>, few: number[]) => alike ? fc.constantFrom(...few) : fc.oneof(fc.constantFrom(...few), wide)
  const optional = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined, freq: 2 })
  return fc.record({
    kind: fc.constantFrom('absolute' as const, 'absolute' as const, 'relative' as const, 'press' as const),
    unused: fc.integer({ min: 0, max: 5 }).map(n => n === 0),
    label: optional(plainText(40)), comment: optional(plainText(200)),
    target: pick(position, [0, 10, 150]), turn: optional(fc.constantFrom('signed' as const, 'positive' as const, 'negative' as const, 'shortest' as const)),
    speed: pick(aboveZero, [100, 250]), acceleration: pick(aboveZero, [2000, 3000]), deceleration: optional(pick(aboveZero, [2000, 3000])),
    forceLimit: optional(pick(aboveZero, [30, 45])), approach: pick(position, [0, 120]), pressSpeed: optional(pick(aboveZero, [5, 10])),
    window: optional(pick(zeroUp, [0.1])), next: optional(fc.oneof(fc.integer({ min: 0, max: 12 }), fc.integer({ min: 0, max: 1023 }))),
    dwell: optional(pick(zeroUp, [0, 200])),
  }).map((raw) => {
    const press = raw.kind === 'press'
    const body: Record<string, unknown> = {
      ...raw, unused: undefined,
      speed: raw.unused ? 0 : raw.speed, acceleration: raw.unused ? 0 : raw.acceleration,
      turn: modulo ? raw.turn : undefined,
      forceLimit: press ? raw.forceLimit ?? 30 : raw.forceLimit,
      approach: press ? raw.approach : undefined, pressSpeed: press ? raw.pressSpeed : undefined,
      dwell: raw.next === undefined ? undefined : raw.dwell,
    }
    return Object.fromEntries(Object.entries(body).filter(([, value]) => value !== undefined)) as unknown as Omit<Move, 'move'>
  })
}

function arbitraryMoves(modulo: boolean, alike: boolean, most: number): fc.Arbitrary<Move[]> {
  return fc.tuple(
    fc.uniqueArray(fc.oneof({ weight: 4, arbitrary: fc.integer({ min: 0, max: most + 3 }) }, { weight: 1, arbitrary: fc.integer({ min: 0, max: 1023 }) }), { maxLength: most }),
    fc.array(arbitraryMoveBody(modulo, alike), { minLength: most, maxLength: most }),
  ).map(([numbers, bodies]) => numbers.sort((a, b) => a - b).map((move, index) => ({ move, ...bodies[index]! })))
}

const arbitraryZones: fc.Arbitrary<Zone[]> = fc.uniqueArray(
  fc.record({ zone: fc.integer({ min: 1, max: 32 }), from: canonicalNumber(-1000, 1000), length: canonicalNumber(1, 1000) }),
  { maxLength: 4, selector: zone => zone.zone },
).map(zones => zones.sort((a, b) => a.zone - b.zone).map(({ zone, from, length }) =>
  ({ zone, from, to: Math.floor((from + length) * 1e6 + 0.5) / 1e6 })))

/** Any content of an axis kind; `alike` makes rows repeat, `most` bounds the number of moves. */
export function arbitraryContent(options: { kind?: AxisKind, alike?: boolean, most?: number } = {}): fc.Arbitrary<Content> {
  const { alike = false, most = 8 } = options
  const kind = options.kind ? fc.constant(options.kind) : fc.constantFrom('linear' as const, 'rotary' as const)
  return kind.chain(axisKind => arbitrarySetup(axisKind).chain(setup => fc.record({
    axisKind: fc.constant(axisKind),
    extra: arbitraryExtra,
    moves: arbitraryMoves(setup.modulo !== undefined, alike, most),
    setup: fc.constant(setup),
    zones: arbitraryZones,
  }, { noNullPrototype: true })))
}

type Edit = { readonly at: number, readonly to: number, readonly act: 'insert' | 'delete' | 'move' | 'edit' | 'renumber', readonly body: Omit<Move, 'move'> }

function edited(content: Content, edits: readonly Edit[]): Content {
  const moves = [...content.moves]
  for (const { at, to, act, body } of edits) {
    const index = moves.length === 0 ? 0 : at % moves.length
    if (act === 'insert') moves.splice(index, 0, { move: 0, ...body })
    else if (moves.length === 0) continue
    else if (act === 'delete') moves.splice(index, 1)
    else if (act === 'move') moves.splice(to % moves.length, 0, ...moves.splice(index, 1))
    else if (act === 'edit') moves[index] = { ...moves[index]!, speed: body.speed, acceleration: body.acceleration }
  }
  const first = edits.some(edit => edit.act === 'renumber') ? 1 : 0
  return { ...content, moves: moves.map((move, index) => ({ ...move, move: index + first })) }
}

/** Two contents as they follow one another at a machine: rows inserted, deleted, moved, edited; numbers run on without gaps. */
export function arbitraryPair(options: { kind?: AxisKind, most?: number } = {}): fc.Arbitrary<readonly [Content, Content]> {
  const edit: fc.Arbitrary<Edit> = fc.record({
    at: fc.nat({ max: 50 }), to: fc.nat({ max: 50 }), act: fc.constantFrom('insert', 'delete', 'move', 'edit', 'renumber'), body: arbitraryMoveBody(false, true),
  })
  const related = fc.tuple(arbitraryContent({ ...options, alike: true, most: options.most ?? 8 }), fc.array(edit, { maxLength: 4 }))
    .map(([content, edits]) => [edited(content, []), edited(content, edits)] as const)
  const unrelated = fc.tuple(arbitraryContent({ ...options, alike: true }), arbitraryContent({ ...options, alike: true }))
  return fc.oneof({ weight: 3, arbitrary: related }, { weight: 1, arbitrary: unrelated })
}
