import type { Rule } from '#shared/api/places'
import { setupField, setupFieldNames, setupGroups } from '#shared/settings/fields'
import { moveFieldNames, moveFields, zoneFieldNames, zoneFields, type RowField } from '#shared/settings/move-fields'
import type { FormField, Option } from '../forms/fields'
import { sayValue } from '../format'

export interface RuleField {
  readonly name: string
  readonly label: string
  readonly type: 'number' | 'flag' | 'choice' | 'text'
  /** Both kinds of axis, as 'mm or deg'. */
  readonly unit: string
  readonly choices: readonly string[]
}

const bothUnits = (unit: { readonly linear: string | null, readonly rotary: string | null } | undefined): string => {
  const words = [...new Set([unit?.linear, unit?.rotary].filter(word => word))]
  return words.join(' or ')
}

function setupRuleField(name: string): RuleField {
  const field = setupField(name)
  const label = `${field?.group ?? ''}: ${field?.label ?? name}`
  if (field?.type === 'choice') return { name, label, type: 'choice', unit: '', choices: [...new Set([...field.choices.linear, ...field.choices.rotary])] }
  if (field?.type === 'flag') return { name, label, type: 'flag', unit: '', choices: [] }
  return { name, label, type: 'number', unit: bothUnits(field?.unit), choices: [] }
}

const inTableOrder = setupGroups.flatMap(group => setupFieldNames.filter(name => setupField(name)?.group === group))
function rowRuleField(section: 'move' | 'zone', name: string, field: RowField): RuleField {
  return { name: `${section}.${name}`, label: `each ${section}: ${field.label}`, type: 'number', unit: bothUnits(field.unit), choices: [] }
}
const ofMoves = moveFieldNames.filter(name => moveFields[name].type === 'number').map(name => rowRuleField('move', name, moveFields[name]))
const ofZones = zoneFieldNames.map(name => rowRuleField('zone', name, zoneFields[name]))

/** Every field that a rule can narrow, in the order of the tables. */
export const ruleFields: readonly RuleField[] = [...inTableOrder.map(setupRuleField), ...ofMoves, ...ofZones]

/** A field by its name; `extra:KEY` is the drive's own and may be a number or a word. */
export function ruleField(name: string): RuleField | undefined {
  if (/^extra:.+/.test(name)) return { name, label: `the drive’s own ${name.slice(6)}`, type: 'text', unit: '', choices: [] }
  return ruleFields.find(field => field.name === name)
}

/** Found by name or label; what begins with extra: stands for itself. */
export async function findRuleField(text: string): Promise<Option[]> {
  const wanted = text.trim().toLowerCase()
  const own = ruleField(text.trim())
  const found = ruleFields.filter(field => `${field.label} ${field.name}`.toLowerCase().includes(wanted))
  return (own && text.startsWith('extra:') ? [own] : found).map(field => ({ value: field.name, label: `${field.label} (${field.name})` }))
}

const bounds = (unit: string): FormField[] => [
  { name: 'min', label: 'At least', type: 'number', unit },
  { name: 'max', label: 'At most', type: 'number', unit },
]

/** What the rule can say of a field: a range and a fixed value for numbers, a fixed value for the rest. */
export function boundFields(field: RuleField | undefined): FormField[] {
  if (!field) return []
  const help = 'Nothing else is allowed.'
  if (field.type === 'number') return [...bounds(field.unit), { name: 'fixed', label: 'Or exactly', type: 'number', unit: field.unit, help }]
  if (field.type === 'flag') return [{ name: 'fixed', label: 'Always', type: 'flag', needed: true, help }]
  if (field.type === 'choice') return [{ name: 'fixed', label: 'Always', type: 'choice', needed: true, options: field.choices.map(value => ({ value, label: value })), help }]
  return [...bounds(''), { name: 'fixed', label: 'Or exactly', type: 'text', mono: true, help }]
}

/** “at most 45 %”, “20 to 60 mm/s”, “always p”. */
export function boundsInWords({ field, min, max, fixed }: Pick<Rule, 'field' | 'min' | 'max' | 'fixed'>): string {
  const unit = ruleField(field)?.unit ?? ''
  if (fixed !== null) return `always ${typeof fixed === 'boolean' ? (fixed ? 'yes' : 'no') : sayValue(fixed, unit)}`
  if (min !== null && max !== null) return `${sayValue(min)} to ${sayValue(max, unit)}`
  return min !== null ? `at least ${sayValue(min, unit)}` : max !== null ? `at most ${sayValue(max, unit)}` : 'nothing said'
}
