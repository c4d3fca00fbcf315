import type { UploadFields } from '#shared/api/uploads'
import type { EntryTable } from '#shared/settings/entry-table/schema'
import type { Nameplate } from '#shared/settings/nameplate'

/** A model with an entry table: all that reading a list of its drive takes. */
export interface LayoutPlate extends Pick<Nameplate, 'model' | 'axisKind'> { readonly entryTable: EntryTable }

/** What a person has said of a file that is a drive's own list. */
export interface Layout {
  readonly plate: LayoutPlate
  readonly serial?: string
  readonly capturedAt?: string
}

export function plateOf({ model, axisKind, entryTable }: Nameplate): LayoutPlate | undefined {
  return entryTable && { model, axisKind, entryTable }
}

/** How the answer travels with the file. */
export function layoutFields(layout: Layout | undefined): Pick<UploadFields, 'layout' | 'serial' | 'capturedAt'> {
  if (layout === undefined) return {}
  const { plate, serial, capturedAt } = layout
  return { layout: plate.model, ...(serial === undefined ? {} : { serial }), ...(capturedAt === undefined ? {} : { capturedAt }) }
}
