import { CodedError } from '../errors/coded'
import { formatNumber } from '../units/number'
import type { Content, ExtraValue, Move, Setup, Zone } from './types'
import { sortedMoveKeys, sortedSetupNames } from './sorted-keys'

/*
 * The canonical form of RFC 8785: keys by UTF-16 code unit, never by language; numbers as ECMAScript prints them; no white
 * space. What has no JSON is refused: left out silently it would give two contents one hash.
 */

const deepest = 1000
const plainText = /^[\x20\x21\x23-\x5b\x5d-\x7e]*$/
const loneSurrogate = /\p{Cs}/u

function refuse(what: string): never {
  throw new CodedError('not-canonical', `${what} has no canonical form.`, { what })
}

function textOf(text: string): string {
  if (plainText.test(text)) return `"${text}"`
  if (loneSurrogate.test(text)) refuse('A lone surrogate')
  return JSON.stringify(text)
}

/** The RFC 8785 text of any JSON value; throws 'not-canonical' on undefined, NaN, the infinities, lone surrogates and what is no plain data. */
export function canonicalJson(value: unknown, depth = 0): string {
  if (depth > deepest) refuse('A value deeper than 1,000 levels')
  if (typeof value === 'number') return formatNumber(value)
  if (typeof value === 'string') return textOf(value)
  if (typeof value === 'boolean' || value === null) return String(value)
  if (Array.isArray(value)) return `[${Array.from(value, each => canonicalJson(each, depth + 1)).join(',')}]`
  if (typeof value !== 'object') return refuse(`A value of type ${typeof value}`)
  const prototype: unknown = Object.getPrototypeOf(value)
  if (prototype !== Object.prototype && prototype !== null) refuse('An object that is no plain data')
  const members = value as Readonly<Record<string, unknown>>
  return `{${Object.keys(members).sort().map(key => `${textOf(key)}:${canonicalJson(members[key], depth + 1)}`).join(',')}}`
}

/** The canonical text of a content as it is stored and hashed; the same as canonicalJson, several times faster, since the keys are known in order. */
export function canonicalText(content: Content): string {
  const { before, setup, after } = contentParts(content)
  return before + setup + after
}

/** The canonical text cut around the setup, which is the part that two units with the same settings may differ in. */
export interface ContentParts {
  readonly before: string
  readonly setup: string
  /** The setup without `homeOffset`: equal on the old unit and on a rightly restored one. */
  readonly copySetup: string
  readonly after: string
}

/** The parts whose concatenation is the canonical text: before, setup or copySetup, after. */
export function contentParts(content: Content): ContentParts {
  const setup = setupText(content.setup, true)
  return {
    before: `{"axisKind":${textOf(content.axisKind)},"extra":${extraText(content.extra)},"moves":[${movesText(content.moves)}],"setup":{`,
    setup,
    copySetup: content.setup.homeOffset === undefined ? setup : setupText(content.setup, false),
    after: `},"zones":[${zonesText(content.zones)}]}`,
  }
}

function valueText(value: string | number | boolean): string {
  return typeof value === 'number' ? formatNumber(value) : typeof value === 'string' ? textOf(value) : String(value)
}

/** What stands before each value: of the first key of an object and of all others. */
const heads = (keys: readonly string[]) => ({ first: keys.map(key => `"${key}":`), next: keys.map(key => `,"${key}":`) })

const moveHeads = heads(sortedMoveKeys)

function movesText(moves: readonly Move[]): string {
  let text = ''
  for (const move of moves) {
    text += text === '' ? '{' : ',{'
    let { first: head } = moveHeads
    for (let index = 0; index < sortedMoveKeys.length; index += 1) {
      const value = move[sortedMoveKeys[index] as keyof Move]
      if (value === undefined) continue
      text += (head[index] as string) + valueText(value)
      head = moveHeads.next
    }
    text += '}'
  }
  return text
}

const setupHeads = heads(sortedSetupNames)

function setupText(setup: Readonly<Setup>, withHomeOffset: boolean): string {
  let text = ''
  let { first: head } = setupHeads
  for (let index = 0; index < sortedSetupNames.length; index += 1) {
    const name = sortedSetupNames[index] as keyof Setup
    const value = setup[name]
    if (value === undefined || (name === 'homeOffset' && !withHomeOffset)) continue
    text += (head[index] as string) + valueText(value)
    head = setupHeads.next
  }
  return text
}

function zonesText(zones: readonly Zone[]): string {
  return zones.map(({ from, to, zone }) => `{"from":${formatNumber(from)},"to":${formatNumber(to)},"zone":${formatNumber(zone)}}`).join(',')
}

function extraText(extra: Readonly<Record<string, ExtraValue>>): string {
  const members = Object.keys(extra).sort().map((key) => {
    const value = extra[key] as ExtraValue
    const text = typeof value === 'object' ? `{"unit":${textOf(value.unit)},"value":${formatNumber(value.value)}}` : valueText(value)
    return `${textOf(key)}:${text}`
  })
  return `{${members.join(',')}}`
}
