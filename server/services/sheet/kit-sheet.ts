import { plain, quantity } from '#shared/checks/format'
import type { papers } from '#shared/api/places'
import { cautions, cautionSources } from '#shared/settings/cautions'
import { hashesOf } from '#shared/settings/hash'
import type { Nameplate } from '#shared/settings/nameplate'
import { railInputOf, railSideOf, railUnit, type RailInput } from '#shared/pictures/rail-input'
import type { Content } from '#shared/settings/types'
import { labelOf } from '#shared/sheet/labels'
import { sheetMoves } from '#shared/sheet/moves'
import { sheetTaught, sheetValues } from '#shared/sheet/values'
import { firstMotion } from '#shared/swap/first-motion'
import { kitOf } from '#shared/swap/kit'
import type { MotionItem } from '#shared/swap/types'
import { formatExact } from '#shared/units/exact-time'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { plantOf } from '../people/plant'
import { checkpointNow } from '../trail/trail'
import { sha256 } from '#server/database/sha256'
import type { KitParts } from '../kit/kit-parts'
import { drawSheet } from './draw-sheet'
import type { MotionLine, SheetWords } from './sheet-words'

export interface SheetOptions {
  /** Where people reach the vault; '' = nobody said, and the QR code holds the tag alone. */
  readonly origin: string
  /** Of the site where it is not said. */
  readonly paper?: (typeof papers)[number] | undefined
}

/** How slow the first motion is. */
const firstPercent = 10
const day = 86_400_000

/** The restore sheet of a kit. */
export function drawKitSheet(vault: Vault, parts: KitParts, options: SheetOptions): Promise<Buffer> {
  return drawWords(sheetWords(vault, parts, options), parts, options)
}

/** Words that are made already, on the paper that is asked for or that the site uses. */
export function drawWords(words: SheetWords, { place, now }: KitParts, { paper }: Pick<SheetOptions, 'paper'>): Promise<Buffer> {
  return drawSheet(words, paper ?? place.site.paper, now)
}

/** Where the label of an axis leads, and its sheet outside of a swap. */
export const axisAddress = (origin: string, tag: string): string => (origin === '' ? tag : `${origin}/axes/${tag}`)

/** Where the QR code of a sheet leads, and in words: to the swap that it is made for, else to the axis. */
function leadsTo({ place: { axis }, swap }: KitParts, { origin }: SheetOptions): Pick<SheetWords, 'address' | 'leadsTo'> {
  return swap === null || origin === ''
    ? { address: axisAddress(origin, axis.tag), leadsTo: origin === '' ? 'holds the tag' : 'leads to the axis' }
    : { address: `${origin}/swaps/${swap.id}`, leadsTo: `leads to swap ${swap.id}` }
}

export function sheetWords(vault: Vault, parts: KitParts, options: SheetOptions): SheetWords {
  const { place: { axis, machine, line, site }, version, mark, fitted, unit, now } = parts
  const nameplate = (unit ? judgingQueries(vault.db).nameplate.get({ model: unit.model })?.nameplate : parts.source.nameplate)
  const { content, left, prove } = unit ? fitted : forSomeUnit(parts)
  const source = { content, ...(nameplate ? { nameplate } : {}), left, prove: prove.filter(name => !name.startsWith('extra:')) }
  const { note, size: entries } = checkpointNow(vault)
  return {
    plant: plantOf(vault), tag: axis.tag, ...leadsTo(parts, options),
    place: [axis.role, machine.name, line.name, site.name].filter(Boolean).join(', ') + (axis.flags.length === 0 ? '' : `. Flagged: ${axis.flags.join(', ')}.`),
    code: hashesOf(content, sha256).scribeCode, facts: factsOf(vault, parts, nameplate),
    notReleased: mark ? null : `Nobody has said that these values are good: no version of ${axis.tag} is known-good, and v${version.number} is the newest. Have a planner review it first, if that can wait.`,
    warnings: unit ? fitted.warnings : [unknownUnit], cautions, cautionSources,
    tableRows: nameplate?.maxMoves ?? null, order: nameplate?.entryTable ? 'in the order of the drive’s own list' : 'by group',
    values: sheetValues(source), taught: sheetTaught(source), moves: sheetMoves(source), rail: railOf(content, nameplate),
    creep: content.setup.homingCreepSpeed === undefined ? '' : `, ${plain(content.setup.homingCreepSpeed)} ${content.axisKind === 'linear' ? 'mm/s' : 'deg/s'}`,
    prove: source.prove.filter(name => name !== 'homeOffset').map(name => labelOf(name).toLowerCase()),
    motion: { title: `First motion at ${firstPercent} % of each move’s speed, nobody in reach`, lines: motionLines(parts, content, nameplate) },
    subject: '', log: `log of ${entries} ${entries === 1 ? 'entry' : 'entries'}`,
    printed: `printed ${formatExact(now, site.timeZone)}`, checkpoint: note.trimEnd().split('\n'),
  }
}

/** Of the values as they go in: a home offset that is to be taught leaves the hard stops open. */
function railOf(content: Content, nameplate: Nameplate | undefined): RailInput | null {
  const { softLimitMin, softLimitMax } = content.setup
  if (content.moves.length === 0 && content.zones.length === 0 && softLimitMin === undefined && softLimitMax === undefined) return null
  const upper = railSideOf(content, railUnit(content))
  return railInputOf({ upper: content }, { upper }, nameplate)
}

const unknownUnit = 'Nobody has said which unit this is for. It is made as for one of the same model and firmware: on another, teach the tuning too, and have the percentages of force worked out for it.'

/** What any unit must be taught is left empty, whoever it will be: a home offset of another encoder runs the axis into its end. */
function forSomeUnit({ source }: KitParts): Pick<KitParts['fitted'], 'content' | 'left' | 'prove'> {
  const { content, teach, prove } = kitOf(source.content, { replaced: 'unit', ownValues: false, out: source, into: source })
  return { content, left: teach, prove }
}

/** The unit that comes out: in a swap as it was said there, since the new one counts as fitted by then; else the one that sits there. */
function unitOut(db: VaultDb, { swap, place, version }: KitParts): UnitRow | undefined {
  const id = swap ? swap.unitOutId : judgingQueries(db).openAtAxis.get({ axisId: place.axis.id })?.unit.id ?? version.unitId
  return id === null ? undefined : unitRows(db).byId.get({ id })
}

function factsOf({ db }: Vault, parts: KitParts, nameplate: Nameplate | undefined): [string, string][] {
  const { place, version, mark, unit, serial, now } = parts
  const out = unitOut(db, parts)
  const thrust = nameplate?.ratedThrust === undefined ? [] : [quantity(nameplate.ratedThrust, place.axis.axisKind === 'linear' ? 'N' : 'N·m')]
  const days = (from: string) => Math.floor((Date.parse(now) - Date.parse(from)) / day)
  return [
    ['Unit in', unit?.serial ?? serial ?? ''],
    ['Its model, firmware, rated', unit ? [unit.model, unit.firmware ?? '', ...thrust].filter(Boolean).join(', ') : serial === null ? '' : 'not registered'],
    ['Known-good', mark ? `v${version.number}, ${mark.by}, ${formatExact(mark.at, place.site.timeZone).replace(/ \d\d:.*$/, '')}, ${days(mark.at)} d old` : `none; v${version.number} is the newest`],
    ['Unit out', out?.serial ?? 'none fitted'],
    ['Its model, firmware', out ? [out.model, out.firmware ?? ''].filter(Boolean).join(', ') : ''],
    [`Code of v${version.number}, read ${days(version.capturedAt)} d ago`, version.scribeCode],
  ]
}

function motionLines({ place: { axis } }: KitParts, content: Content, nameplate: Nameplate | undefined): MotionLine[] {
  const unit = content.axisKind === 'linear' ? 'mm' : 'deg'
  return firstMotion({ content, flags: axis.flags, ...(nameplate ? { nameplate } : {}), speedPercent: firstPercent }).map(item => ({
    call: callWords(item), words: item.words,
    ends: item.end === null ? '' : `${plain(item.end)} ${unit}`,
    takes: item.seconds === null ? '' : `${item.atLeast ? 'at least ' : ''}${item.seconds.toFixed(1)}`,
  }))
}

const callNames: Readonly<Record<string, string>> = { 'jog': 'Jog', 'brake-hold': 'Brake', 'enable-loss': 'Enable', 'emergency-stop': 'Stop' }
const callWords = ({ item, moves }: MotionItem) => callNames[item] ?? moves.join('›')
