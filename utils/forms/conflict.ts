import { draftOf, type Body, type Draft, type DraftValue, type FormField } from './fields'

/** One field that somebody else changed while it was open here. */
export interface Conflict { readonly label: string, readonly name: string, readonly before: string, readonly theirs: string, readonly mine: string }

function shown(field: FormField, value: DraftValue | undefined): string {
  const texts = Array.isArray(value) ? value : [String(value ?? '')]
  const named = texts.map(text => 'options' in field ? field.options.find(option => option.value === text)?.label ?? text : text)
  return named.join(', ') === '' ? '–' : named.join(', ')
}

/** Where what stands in the vault now differs from what was read here, or from what is written here. */
export function conflicts(fields: readonly FormField[], before: Draft, mine: Draft, theirs: Readonly<Body>): Conflict[] {
  const now = draftOf(fields, theirs)
  return fields.flatMap((field) => {
    const texts = { before: shown(field, before[field.name]), theirs: shown(field, now[field.name]), mine: shown(field, mine[field.name]) }
    return texts.theirs === texts.before || field.type === 'password' ? [] : [{ name: field.name, label: field.label, ...texts }]
  })
}

/** Theirs, with what was edited here on top: fields that nobody edited here take what stands in the vault now. */
export function onTop(fields: readonly FormField[], before: Draft, mine: Draft, theirs: Readonly<Body>): Draft {
  const now = draftOf(fields, theirs)
  return Object.fromEntries(fields.map(({ name }) => {
    const edited = JSON.stringify(before[name]) !== JSON.stringify(mine[name])
    return [name, (edited ? mine[name] : now[name]) ?? '']
  }))
}
