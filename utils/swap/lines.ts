import type { Swap, SwapKit } from '#shared/api/swaps'
import type { Nameplate } from '#shared/settings/nameplate'
import { counted } from '~/utils/format'
import { bareValue, listedName } from './words'

/** One thing to do and to tick off. */
export interface Line { readonly key: string, readonly label: string, readonly hint?: string }

const homingWords: Readonly<Record<string, string>> = {
  'hard-stop': 'against the hard stop', 'limit-switch': 'onto the limit switch', 'home-switch': 'onto the home switch', 'index-pulse': 'onto the index pulse',
  'current-position': 'where it stands', 'absolute-encoder': 'by the absolute encoder',
}

/** What is done between the kit and the read-back, in its order; a drive that stays keeps its table. */
export function writeLines(swap: Swap, kit: SwapKit | undefined, nameplate?: Nameplate): Line[] {
  const serial = swap.unitIn?.serial ?? 'the new unit'
  if (!kit) return swap.replaced === 'actuator' ? [] : resetLines(serial, undefined, nameplate)
  const { setup, moves } = kit.content
  const axisKind = kit.content.axisKind
  return [
    ...(swap.replaced === 'actuator' ? [] : resetLines(serial, moves.length, nameplate)),
    ...valueLines(swap, kit, nameplate),
    { key: 'restart', label: 'Restart the drive', hint: 'before anything turns' },
    ...homeLines(setup, axisKind === 'linear' ? 'mm' : 'deg'),
    ...kit.prove.filter(name => name !== 'homeOffset').map((name) => {
      const { label, unit } = listedName(name, axisKind, nameplate)
      const value = setup[name] ?? kit.content.extra[name.replace(/^extra:/, '')]
      return { key: `prove ${name}`, label: `Prove ${label.toLowerCase()}, ${bareValue(value)} ${unit === 'drive’s own' ? 'in the drive’s own unit' : unit}`.trim(), hint: 'copied; look whether it holds on this unit' }
    }),
  ]
}

function resetLines(serial: string, rows: number | undefined, nameplate?: Nameplate): Line[] {
  const all = nameplate?.maxMoves === undefined ? 'the whole' : `all ${nameplate.maxMoves} rows of the`
  return [
    { key: 'reset', label: `Reset ${serial}`, hint: 'to its delivered state' },
    { key: 'clear', label: `Clear ${all} move table`, hint: rows === 0 ? 'no move is called on this axis' : 'first, so that no old row answers a call' },
  ]
}

function valueLines(swap: Swap, { content }: SwapKit, nameplate?: Nameplate): Line[] {
  const values = Object.keys(content.setup).length + Object.keys(content.extra).length
  const order = nameplate?.entryTable ? 'in the order of the drive’s list' : 'from top to bottom'
  const zones = content.zones.length > 0 ? ` and ${counted(content.zones.length, 'zone', 'zones')}` : ''
  const numbers = content.moves.flatMap(({ move }) => typeof move === 'number' ? [move] : [])
  if (swap.replaced === 'actuator') {
    return swap.adjustments.length > 0
      ? [{ key: 'values', label: `Write the ${counted(swap.adjustments.length, 'value that changes', 'values that change')}`, hint: 'the drive keeps the rest; they stand below' }]
      : [{ key: 'values', label: 'The drive keeps its values', hint: 'none of them changes with this actuator' }]
  }
  return [
    { key: 'values', label: `Write ${counted(values, 'value', 'values')}${zones}`, hint: order },
    ...(numbers.length > 0 ? [{ key: 'moves', label: `Write ${numbers.length === 1 ? `move ${numbers[0]}` : `moves ${Math.min(...numbers)} to ${Math.max(...numbers)}`}`, hint: `${counted(numbers.length, 'row', 'rows')}; then count the rows in the drive: ${numbers.length}` }] : []),
  ]
}

function homeLines(setup: SwapKit['content']['setup'], unit: string): Line[] {
  const { homingMethod, homingDirection, homingCreepSpeed, homeOffset } = setup
  const at = homingCreepSpeed === undefined ? 'at creep speed' : `at creep speed, ${bareValue(homingCreepSpeed)} ${unit}/s`
  const how = [homingWords[String(homingMethod)] ?? 'as the drive does', homingDirection, 'hand on the stop'].filter(Boolean).join(', ')
  return [
    { key: 'home', label: `Home ${at}`, hint: how },
    homeOffset === undefined
      ? { key: 'zero', label: 'Teach the zero at the scribed mark', hint: 'the offset of the old unit means another place on this one' }
      : { key: 'zero', label: 'Prove the zero at the scribed mark', hint: `offset ${bareValue(homeOffset)} ${unit} is copied; write it anew if the marks are off` },
  ]
}
