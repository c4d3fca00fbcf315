import type { SetupFieldName } from '../settings/fields'
import type { Nameplate } from '../settings/nameplate'
import type { Content } from '../settings/types'
import { carriedValues, type CarryCase } from './carried'
import { rescaled, type Rescaled } from './rescale'
import type { Adjustment, CarriedValue, KitContent } from './types'

/** The known-good as fitted to the new unit: percentages rescaled, what is to be taught left out and named. */
export function kitOf(content: Content, swap: CarryCase): KitContent {
  const carried = carriedValues(content, swap)
  const { content: fitted, adjustments } = swap.ownValues ? { content, adjustments: [] } : adjusted(content, swap)
  const taught = carried.filter(({ carry }) => carry === 'teach')
  const taughtSetup = taught.filter(({ section }) => section === 'setup').map(({ field }) => field as SetupFieldName)
  const taughtExtra = taught.filter(({ section }) => section === 'extra').map(({ field }) => field ?? '')
  return {
    content: { ...fitted, setup: without(fitted.setup, taughtSetup), extra: without(fitted.extra, taughtExtra) },
    adjustments: adjustments.filter(({ field }) => !taughtSetup.some(name => name === field)), carried, taughtSetup, taughtExtra,
    teach: taught.map(nameOf),
    prove: carried.filter(({ carry }) => carry === 'prove').map(nameOf),
  }
}

/** Percentages as the new unit means them, and the home offset by the sign that it counts with. */
function adjusted(content: Content, { out, into }: CarryCase): Rescaled {
  const forces = rescaled(content, out, into)
  const { homeOffset } = content.setup
  if (homeOffset === undefined || homeOffset === 0 || !out.nameplate || !into.nameplate || senseOf(out.nameplate) === senseOf(into.nameplate)) return forces
  const after = -homeOffset
  const why = `${into.model} counts home the other way than ${out.model}: the same place has the other sign.`
  const turned: Adjustment = { at: '/setup/homeOffset', section: 'setup', field: 'homeOffset', before: homeOffset, after, unit: content.axisKind === 'linear' ? 'mm' : 'deg', newtonsBefore: null, newtonsAfter: null, why }
  return { content: { ...forces.content, setup: { ...forces.content.setup, homeOffset: after } }, adjustments: [turned, ...forces.adjustments] }
}

const senseOf = ({ homeOffsetSense = 'zero-is-home-plus-offset' }: Nameplate) => homeOffsetSense

function nameOf({ section, field = '' }: CarriedValue): string {
  return section === 'extra' ? `extra:${field}` : field
}

function without<Values extends object>(values: Values, keys: readonly string[]): Values {
  return Object.fromEntries(Object.entries(values).filter(([key]) => !keys.includes(key))) as Values
}
