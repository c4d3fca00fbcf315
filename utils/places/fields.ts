import type { Axis } from '#shared/api/versions'
import { papers, type Line, type Machine } from '#shared/api/places'
import { axisFlags, type AxisFlag } from '#shared/settings/types'
import { numberOrText, type Body, type Draft, type FormField, type Option } from '../forms/fields'

export const options = (rows: readonly { readonly id: number, readonly name: string }[]): Option[] => rows.map(row => ({ value: String(row.id), label: row.name }))

const zone = (zones: readonly string[]): FormField => ({ name: 'timeZone', label: 'Time zone', type: 'text', needed: true, suggestions: zones, example: 'Europe/Berlin', help: 'All times of this site are shown in it.' })
const siteName: FormField = { name: 'name', label: 'Name', type: 'text', needed: true, help: 'The plant, or the hall, as people call it.' }

export const newSiteFields = (zones: readonly string[]): FormField[] => [siteName, zone(zones)]
export const siteFields = (zones: readonly string[]): FormField[] => [
  siteName, zone(zones),
  { name: 'fourEyes', label: 'Four eyes', type: 'flag', needed: true, help: 'Who marks a version known-good is not the one who brought in its harm values.' },
  { name: 'knownGoodMonths', label: 'Known-good stays fresh', type: 'number', unit: 'months', needed: true, help: 'Older ones count as too old on the board.' },
  { name: 'releaseHours', label: 'Release of a swap within', type: 'number', unit: 'h', needed: true },
  { name: 'labelWanted', label: 'A printed label is wanted', type: 'flag', needed: true, help: 'An axis without one does not count as ready to be restored.' },
  { name: 'attachmentWanted', label: 'The drive tool’s own backup is wanted', type: 'flag', needed: true, help: 'Attached to the known-good version; without one the axis does not count as ready.' },
  { name: 'paper', label: 'Restore sheets are printed on', type: 'choice', needed: true, options: papers.map(paper => ({ value: paper, label: paper })) },
  { name: 'watched', label: 'Watched besides the usual ones', type: 'list', help: 'Names of fields as on the format page, cut by commas: jerk, extra:K-017.' },
]

export const lineFields: FormField[] = [{ name: 'name', label: 'Name', type: 'text', needed: true }]
export const machineFields = (lines: readonly Line[]): FormField[] => [
  { name: 'name', label: 'Name', type: 'text', needed: true },
  { name: 'lineId', label: 'Line', type: 'choice', as: 'number', needed: true, options: options(lines) },
  { name: 'controllerScanMs', label: 'Scan of the controller', type: 'number', unit: 'ms', empty: null, help: 'How often it looks at the drives and sets their inputs. Settle times, start pulses and zones are judged by it; empty: not known.' },
]

const flagWords: Readonly<Record<AxisFlag, string>> = {
  gravity: 'gravity: it can fall when nothing holds it',
  press: 'press: it pushes on work or people could reach in',
  collision: 'collision: its moves can hit something',
}
export const flagOptions: Option[] = axisFlags.map(flag => ({ value: flag, label: flagWords[flag] }))
const kinds: Option[] = [{ value: 'linear', label: 'linear: mm' }, { value: 'rotary', label: 'rotary: degrees' }]

const everyAxis: FormField[] = [
  { name: 'tag', label: 'Tag', type: 'text', mono: true, needed: true, example: 'LID-02.Z', help: '1 to 32 of A-Z a-z 0-9 . _ -, unique; LID-02.z is the same tag.' },
  { name: 'role', label: 'Role', type: 'text', empty: '', example: 'seat lid', help: 'What it does, in two words. Axes of one role and model are sisters.' },
]
const furtherAxis: FormField[] = [
  { name: 'flags', label: 'What it can do to people and machine', type: 'many', options: flagOptions, help: 'On a flagged axis the motion of its moves weighs as harm.' },
  { name: 'bus', label: 'Bus', type: 'text', empty: '', example: 'bus-1', help: 'Axes on one bus must not share an address.' },
  { name: 'uploadEveryHours', label: 'An upload is due every', type: 'number', unit: 'h', empty: null, help: 'Empty: never due.' },
  { name: 'dutyMoves', label: 'Duty: moves of a cycle, in order', type: 'list', as: 'number', help: 'Numbers of moves, like 1, 2, 1. For the load of the drive over time.' },
  { name: 'dutyCycleTime', label: 'Duty: time of a cycle', type: 'number', unit: 'ms' },
]
export const newAxisFields: FormField[] = [...everyAxis, { name: 'axisKind', label: 'Kind', type: 'choice', needed: true, options: kinds, help: 'Fixed once registered.' }, ...furtherAxis]
export const axisFields = (machines: readonly Machine[]): FormField[] => [
  ...everyAxis, { name: 'machineId', label: 'Machine', type: 'choice', as: 'number', needed: true, options: options(machines) }, ...furtherAxis,
]

/** An axis as its form shows it: duty cut in two. */
export const axisRecord = (axis: Axis): Body => ({ ...axis, machineId: axis.machine.id, dutyMoves: axis.duty?.moves, dutyCycleTime: axis.duty?.cycleTime })

/** Two inputs are one duty: both empty = none. Left out where neither was edited. */
export function axisShape({ dutyMoves: _moves, dutyCycleTime: _time, ...body }: Body, draft: Draft): Body {
  if (_moves === undefined && _time === undefined) return body
  const moves = String(draft.dutyMoves ?? '').split(/[,\n]/).map(part => part.trim()).filter(part => part !== '').map(numberOrText)
  const time = String(draft.dutyCycleTime ?? '').trim()
  return { ...body, duty: moves.length === 0 && time === '' ? null : { moves, cycleTime: time === '' ? undefined : numberOrText(time) } }
}
