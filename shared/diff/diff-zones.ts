import { zoneFieldNames } from '../settings/move-fields'
import type { Zone } from '../settings/types'
import { changeOf } from './change'
import type { Sides } from './sides'
import type { FieldChange } from './types'
import { walkByNumber } from './walk'

/** Adds the changes of all zones, paired by number. */
export function pushZoneChanges(out: FieldChange[], sides: Sides): void {
  walkByNumber<Zone>(sides.before.zones, sides.after.zones, zone => zone.zone, (before, i, after, j) => {
    for (const field of zoneFieldNames) {
      const was = before?.[field]
      const is = after?.[field]
      if (was === is) continue
      const at = is === undefined ? `/zones/${i}/${field}` : `/zones/${j}/${field}`
      const rule = (is === undefined ? sides.was : sides.is).zone[field]
      out.push(changeOf(rule, { at, section: 'zone', row: (after ?? before)?.zone }, was, is, false))
    }
  })
}
