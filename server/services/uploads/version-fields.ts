import type { UploadFields } from '#shared/api/uploads'
import type { Occasion } from '#shared/api/versions'

/** What is stored beside a version; `read-back` is said by a swap alone. */
export type VersionFields = Omit<UploadFields, 'occasion'> & { readonly occasion?: Occasion | undefined }
