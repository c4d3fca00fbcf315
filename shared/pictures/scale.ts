import type { AxisKind } from '../settings/types'
import { fromMillionths } from '../units/number'

/*
 * Steps of a drawn scale, chosen from the pixels that one unit takes: ticks never closer than 5 px, labels never closer
 * than 46 px, however wide the picture is. A label always stands on a tick.
 */

export const tickPixels = 5
export const labelPixels = 46
/** Advance of one mono figure at 12 px, with the air that a halo takes. */
export const figurePixels = 7.3

export interface ScaleSteps { readonly tick: number, readonly label: number }
export interface ScaleTick { readonly at: number, readonly height: number }

const lengthSeries = [1, 2, 5]
const angleSteps = [1, 2, 5, 10, 15, 30, 45, 90, 180, 360]

function seriesOf(axisKind: AxisKind): number[] {
  const powers = (from: number, to: number) => Array.from({ length: to - from + 1 }, (_, index) => 10 ** (from + index))
  const decades = (exponents: number[]) => exponents.flatMap(power => lengthSeries.map(first => first * power))
  return axisKind === 'linear'
    ? decades(powers(-6, 9))
    : [...decades(powers(-6, -1)), ...angleSteps, ...decades(powers(0, 6)).map(turns => turns * 720)]
}

const nearest = (value: number) => Math.floor(value + 0.5)
/** A place on a picture: to a tenth of a pixel, halves up. */
export const tenth = (value: number): number => nearest(value * 10) / 10

const isMultiple = (of: number, step: number) => Math.abs(of / step - nearest(of / step)) < 1e-9

/** A whole multiple of a step without the noise of binary fractions; six decimals are all that a value can have. */
const multiple = (count: number, step: number) => fromMillionths(nearest(count * step * 1e6))

export function scaleSteps(pixelsPerUnit: number, axisKind: AxisKind, widestLabel: number = labelPixels): ScaleSteps {
  const series = seriesOf(axisKind)
  const last = series[series.length - 1] ?? 1
  const tick = series.find(step => step * pixelsPerUnit >= tickPixels) ?? last
  const room = Math.max(labelPixels, widestLabel)
  const label = series.find(step => step * pixelsPerUnit >= room && isMultiple(step, tick)) ?? last
  return { tick, label }
}

/** All ticks from low to high, ends included; the tall ones carry a label, the middling ones halve it. */
export function scaleTicks(low: number, high: number, steps: ScaleSteps): ScaleTick[] {
  const first = Math.ceil(low / steps.tick - 1e-9)
  const last = Math.floor(high / steps.tick + 1e-9)
  const halves = isMultiple(steps.label / 2, steps.tick)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => {
    const at = multiple(first + index, steps.tick)
    const height = isMultiple(at, steps.label) ? 10 : halves && isMultiple(at, steps.label / 2) ? 7 : 4
    return { at, height }
  })
}

export type Anchor = 'start' | 'middle' | 'end'
export interface PlacedLabel { readonly x: number, readonly text: string, readonly anchor: Anchor }

/** A number as it is drawn: a true minus sign, never an exponent within the range of a setting. */
export const figure = (value: number) => String(value).replace('-', '−')

export const textWidth = (text: string) => text.length * figurePixels

/** Left and right end of a placed text. */
export function extentOf(label: PlacedLabel): readonly [number, number] {
  const width = textWidth(label.text)
  const left = label.anchor === 'start' ? label.x : label.anchor === 'end' ? label.x - width : label.x - width / 2
  return [left, left + width]
}

/** Labels of a scale, turned inwards at the two ends; one that would touch an end label is left out. */
export function scaleLabels(ticks: readonly ScaleTick[], label: number, x: (at: number) => number, left: number, right: number): PlacedLabel[] {
  const placed: PlacedLabel[] = ticks.filter(tick => isMultiple(tick.at, label)).map((tick) => {
    const text = figure(tick.at)
    const half = textWidth(text) / 2
    if (x(tick.at) - half < left) return { x: x(tick.at) + 4, text, anchor: 'start' }
    if (x(tick.at) + half > right) return { x: x(tick.at) - 4, text, anchor: 'end' }
    return { x: x(tick.at), text, anchor: 'middle' }
  })
  const kept: PlacedLabel[] = []
  for (const next of placed.toReversed()) {
    const follower = kept[0]
    if (!follower || extentOf(next)[1] + 6 <= extentOf(follower)[0]) kept.unshift(next)
  }
  return kept
}
