import type { Content } from '#shared/settings/types'
import { extraWords, rowWords, setupWords, type WordContext } from './fields'

const unescape = (part: string) => part.replaceAll('~1', '/').replaceAll('~0', '~')

/** A JSON Pointer into a content as a person says it: 'move 3, target', 'thrust limit', 'zone 2, from'. */
export function pointerWords(pointer: string, content: Content, context: WordContext): string {
  const [section = '', key = '', field] = pointer.split('/').slice(1).map(unescape)
  if (section === 'setup') return setupWords(key, context).label
  if (section === 'extra') return extraWords(key, context.nameplate?.dictionary).label
  if (section === 'moves') {
    const number = content.moves[Number(key)]?.move
    return [`move ${number ?? key}`, field && rowWords('move', field, context).label].filter(Boolean).join(', ')
  }
  if (section === 'zones') return [`zone ${content.zones[Number(key)]?.zone ?? key}`, field && rowWords('zone', field, context).label].filter(Boolean).join(', ')
  return section === 'axisKind' ? 'axis kind' : pointer
}

/** What a rule waits for: a setting or a value of the nameplate. */
export function missingWords(name: string, context: WordContext): string {
  if (name.startsWith('nameplate.')) return `${name.slice('nameplate.'.length).replace(/[A-Z]/g, letter => ` ${letter.toLowerCase()}`)} on the nameplate`
  return name === 'nameplate' ? 'a nameplate of the model' : setupWords(name, context).label
}
