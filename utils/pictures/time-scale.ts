import { textWidth } from '#shared/pictures/scale'

/*
 * A time axis in calendar steps of one zone: minor ticks never closer than 5 px, labels never closer than 46 px. Months
 * and years begin where they begin in the plant, not at midnight UTC.
 */

export interface TimeTick { readonly at: number, readonly x: number, readonly label: string | null }

const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const monthSteps = [1, 3, 6, 12, 24, 60, 120]
const daySteps = [1, 7]
const dayMs = 86_400_000

interface Day { readonly year: number, readonly month: number, readonly day: number }

/** Midnight of a calendar day in the zone; the offset is looked up at the instant itself, so that summer time holds. */
function midnight(date: Day, zone: string): number {
  const utc = Date.UTC(date.year, date.month, date.day)
  const first = utc - offsetAt(utc, zone)
  return utc - offsetAt(first, zone)
}

/** Making a formatter takes a thousand times as long as using it, and a page has one zone, hardly ever two. */
const clocks = new Map<string, Intl.DateTimeFormat>()

function clockOf(zone: string): Intl.DateTimeFormat {
  const known = clocks.get(zone)
  if (known) return known
  const made = new Intl.DateTimeFormat('en-GB', { timeZone: zone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit' })
  clocks.set(zone, made)
  return made
}

function partsAt(instant: number, zone: string): Record<string, number> {
  return Object.fromEntries(clockOf(zone).formatToParts(instant).map(part => [part.type, Number(part.value)]))
}

function offsetAt(instant: number, zone: string): number {
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = partsAt(instant, zone)
  return Date.UTC(year, month - 1, day, hour, minute, second) - Math.floor(instant / 1000) * 1000
}

const labelOf = (date: Day, byDay: boolean) => {
  if (byDay) return `${date.day} ${monthNames[date.month] ?? ''}`
  return date.month === 0 ? String(date.year) : monthNames[date.month] ?? ''
}

function monthTicks(from: number, to: number, zone: string, step: number): { at: number, date: Day }[] {
  const { year = 1970, month = 1 } = partsAt(from, zone)
  const first = Math.floor((year * 12 + month - 1) / step) * step
  const count = Math.ceil((to - from) / (dayMs * 28) / step) + 2
  return Array.from({ length: count }, (_, index) => {
    const months = first + index * step
    const date = { year: Math.floor(months / 12), month: months % 12, day: 1 }
    return { at: midnight(date, zone), date }
  }).filter(tick => tick.at >= from && tick.at <= to)
}

function dayTicks(from: number, to: number, zone: string, step: number): { at: number, date: Day }[] {
  const { year = 1970, month = 1, day = 1 } = partsAt(from, zone)
  return Array.from({ length: Math.ceil((to - from) / dayMs / step) + 2 }, (_, index) => {
    const utc = new Date(Date.UTC(year, month - 1, day + index * step))
    const date = { year: utc.getUTCFullYear(), month: utc.getUTCMonth(), day: utc.getUTCDate() }
    return { at: midnight(date, zone), date }
  }).filter(tick => tick.at >= from && tick.at <= to)
}

export function timeTicks(from: number, to: number, left: number, right: number, zone: string): TimeTick[] {
  const perMs = (right - left) / Math.max(1, to - from)
  const x = (at: number) => Number((left + (at - from) * perMs).toFixed(1))
  const room = 58
  const labelMonths = monthSteps.find(step => step * 28 * dayMs * perMs >= room) ?? 120
  if (30 * dayMs * perMs >= room * 4) {
    const step = daySteps.find(days => days * dayMs * perMs >= room) ?? 7
    return dayTicks(from, to, zone, step).map(tick => ({ at: tick.at, x: x(tick.at), label: labelOf(tick.date, true) })).map(tick => fitting(tick, right))
  }
  const tickMonths = monthSteps.find(step => step * 28 * dayMs * perMs >= 5) ?? 120
  return monthTicks(from, to, zone, tickMonths).map(({ at, date }) => {
    const labelled = (date.year * 12 + date.month) % labelMonths === 0
    return fitting({ at, x: x(at), label: labelled ? labelOf(date, false) : null }, right)
  })
}

/** A label that would run over the end is left out; its tick stays. */
const fitting = (tick: TimeTick, right: number): TimeTick =>
  tick.label !== null && tick.x + 4 + textWidth(tick.label) > right ? { ...tick, label: null } : tick
