import { cruiseSeconds } from '../motion'
import { percentOf, thrustDigits, worstOf, type Shown } from '../motion-runs'
import type { RunPair } from '../motion-pairs'
import { figure } from '#shared/pictures/scale'

const short = (value: number, digits = 3) => figure(Number(value.toFixed(digits)))

interface Row { readonly label: string, readonly unit: string, readonly before: number | undefined, readonly after: number | undefined }

/** The numbers of the picture, before and after; what neither side can tell is left out. */
export function pairRows({ before, after }: RunPair, unit: string): Row[] {
  const force = after.shown.thrust?.unit ?? before.shown.thrust?.unit ?? 'N'
  const word = force === 'N' ? 'thrust' : 'torque'
  const digits = thrustDigits(force)
  const row = (label: string, unitWord: string, of: (shown: Shown) => number | undefined, places = 3): Row => {
    const cut = (value: number | undefined) => value === undefined || !Number.isFinite(value) ? undefined : Number(value.toFixed(places))
    return { label, unit: unitWord, before: cut(of(before.shown)), after: cut(of(after.shown)) }
  }
  const alone = after.run.moves.length === 1
  const atLeast = before.shown.atLeast || after.shown.atLeast
  return [
    row('distance', unit, ({ legs }) => legs.reduce((sum, { from, to }) => sum + Math.abs(to - from), 0)),
    row(atLeast ? 'time, at least' : 'time', 's', ({ course }) => course.duration),
    row('top speed', `${unit}/s`, ({ course }) => course.peakSpeed),
    ...(alone ? [row('at the speed asked for', 's', ({ course, legs }) => cruiseSeconds(course.segments, legs[0]?.move.speed ?? Infinity))] : []),
    row(`most ${word}`, force, shown => worstOf(shown)?.need, digits),
    row('its limit', force, shown => worstOf(shown)?.limit, digits),
    row('of that limit', '%', (shown) => {
      const worst = worstOf(shown)
      return worst && percentOf(worst)
    }),
    row(`mean ${word}, begun again and again`, force, ({ mean }) => mean?.thrust, digits),
    row('of the rated one', '%', ({ mean }) => mean?.percent, 1),
  ].filter(({ before: was, after: is }) => was !== undefined || is !== undefined)
}

function thrustWords(shown: Shown): string | undefined {
  const worst = worstOf(shown)
  const { unit } = shown.thrust ?? {}
  if (!worst || unit === undefined) return undefined
  const percent = percentOf(worst)
  const need = `${short(worst.need, thrustDigits(unit))} ${unit}`
  return percent === undefined ? need : `${need}, ${percent} % of its limit of ${short(worst.limit, thrustDigits(unit))} ${unit}`
}

/** 'It takes 0.333 s, before 0.472 s, and needs at most 205 N, 59 % of its limit of 352 N; before 165 N, 68 % of its limit of 243.2 N.' */
export function pairSentence({ before, after }: RunPair): string {
  const [was, is] = [short(before.shown.course.duration), short(after.shown.course.duration)]
  const time = `It takes ${after.shown.atLeast ? 'at least ' : ''}${is} s${was === is ? ' as before' : `, before ${was} s`}`
  const [hadNeeded, needs] = [thrustWords(before.shown), thrustWords(after.shown)]
  if (needs === undefined) return `${time}.`
  const then = hadNeeded === undefined ? '' : hadNeeded === needs ? ', as before' : `; before ${hadNeeded}`
  return `${time}, and needs at most ${needs}${then}.`
}
