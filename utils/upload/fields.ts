import type { UploadFields } from '#shared/api/uploads'
import { layoutFields } from './layout'
import { wantsReason, type ListedFile } from './model'

export type UploadOccasion = NonNullable<UploadFields['occasion']>

/** The words beside the files, as they stand in the form. */
export interface Words {
  occasion: UploadOccasion
  workOrder: string
  /** One reason for all, or one for each axis with a watched change. */
  scope: 'together' | 'each'
  reason: string
  /** By tag. */
  reasons: Record<string, string>
  changedBy: string
  allowedBy: string
}

export const noWords = (): Words => ({ occasion: 'routine', workOrder: '', scope: 'each', reason: '', reasons: {}, changedBy: '', allowedBy: '' })

export interface NamedPerson { readonly id: number, readonly name: string }

/** A name chosen from the register is sent as `person:ID`, so that it means that person; any other text goes as it stands. */
export function asPerson(text: string, people: readonly NamedPerson[]): string {
  const same = people.filter(person => person.name === text.trim())
  return same.length === 1 && same[0] ? `person:${same[0].id}` : text.trim()
}

export function reasonFor(file: ListedFile, words: Words): string {
  if (words.scope === 'together') return words.reason.trim()
  return wantsReason(file.reading) ? (words.reasons[file.reading.axis.tag] ?? '').trim() : ''
}

/** What travels with one of so many files; empty texts stay away. One reason for many explains no finding, and says so. */
export function fieldsFor(file: ListedFile, words: Words, people: readonly NamedPerson[], files: number): UploadFields {
  const texts = {
    reason: reasonFor(file, words),
    workOrder: words.workOrder.trim(),
    changedBy: asPerson(words.changedBy, people),
    allowedBy: asPerson(words.allowedBy, people),
  }
  const together = words.scope === 'together' && (texts.reason !== '' || texts.workOrder !== '') && files > 1
  return {
    occasion: words.occasion,
    ...(together ? { together: 'yes' as const } : {}),
    ...Object.fromEntries(Object.entries(texts).filter(([, text]) => text !== '')),
    ...(file.decimal ? { decimal: file.decimal } : {}),
    ...layoutFields(file.layout),
    name: (file.name.split('/').at(-1) ?? file.name).slice(0, 255),
  }
}

/** Axes with a watched change whose finding will wait for an explanation. */
export function unexplained(files: readonly ListedFile[], words: Words): string[] {
  const together = words.scope === 'together' && files.filter(file => file.reading.state === 'placed').length > 1
  return files.filter(file => wantsReason(file.reading) && (together || (reasonFor(file, words) === '' && words.workOrder.trim() === '')))
    .map(file => file.reading.state === 'placed' ? file.reading.axis.tag : file.name)
}
