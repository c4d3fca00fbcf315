import type { VersionOne } from '#shared/api/versions'
import { counted } from '../format'

const encodings: Readonly<Record<string, string>> = { 'utf-8': 'UTF-8', 'utf-8-bom': 'UTF-8 with a mark', 'utf-16le': 'UTF-16', 'utf-16be': 'UTF-16', 'windows-1252': 'Windows-1252' }
const delimiters: Readonly<Record<string, string>> = { ',': 'commas', ';': 'semicolons', '\t': 'tabs' }

/** What reading a file did to it without changing its meaning, in one sentence. */
export function receiptWords(normalised: VersionOne['normalised']): string {
  const parts = [
    `Read as ${encodings[normalised.encoding] ?? normalised.encoding}`,
    ...(normalised.delimiter ? [`cut at ${delimiters[normalised.delimiter] ?? normalised.delimiter}`] : []),
    ...(normalised.decimal === 'comma' ? ['decimal commas'] : []),
    normalised.converted ? `${counted(normalised.converted, 'value', 'values')} converted from another unit` : 'no unit converted',
    normalised.rounded ? `${counted(normalised.rounded, 'value', 'values')} rounded to six decimals` : 'nothing rounded',
  ]
  return `${parts.join(', ')}.`
}
