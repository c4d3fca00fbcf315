/** Every address of the application is made here, so that none is spelt twice. */
export const addressOf = {
  board: () => '/',
  signIn: (back?: string) => (back && back !== '/' ? `/sign-in?to=${encodeURIComponent(back)}` : '/sign-in'),
  machine: (id: number) => `/machines/${id}`,
  axis: (tag: string) => `/axes/${encodeURIComponent(tag)}`,
  label: (tag: string) => `/axes/${encodeURIComponent(tag)}/label`,
  version: (tag: string, number: number) => `/axes/${encodeURIComponent(tag)}/versions/${number}`,
  /** a stands before, b after; both are ids of versions. */
  changes: (before: number, after: number) => `/changes?a=${before}&b=${after}`,
  /** With a place: the history of that one value; `section`, `field` and `row` as changes have them. */
  history: (of?: { readonly axis?: string, readonly section: string, readonly field: string, readonly row?: number | null | undefined }) => {
    if (of === undefined) return '/history'
    const field = of.section === 'setup' || of.section === 'file' ? of.field : of.section === 'extra' ? `extra:${of.field}` : `${of.section}.${of.field}`
    return `/history?${new URLSearchParams({ field, ...(of.axis !== undefined && { axis: of.axis }), ...(typeof of.row === 'number' && { row: String(of.row) }) }).toString()}`
  },
  /** With a place: the form stands open for it; `from` and `to` are instants. */
  reports: (of?: { readonly scope?: string, readonly scopeId?: number, readonly from?: string, readonly to?: string }) => {
    if (of === undefined) return '/reports'
    const { scope, scopeId, from, to } = of
    return `/reports?${new URLSearchParams({ place: scope === undefined ? '' : `${scope}:${scopeId ?? ''}`, ...(from !== undefined && { from }), ...(to !== undefined && { to }) }).toString()}`
  },
  findings: () => '/findings',
  finding: (id: number) => `/findings/${id}`,
  planned: () => '/planned',
  trail: () => '/trail',
  upload: () => '/upload',
  tray: () => '/tray',
  /** With a tag: to begin one there. */
  swaps: (tag?: string) => tag === undefined ? '/swaps' : `/swaps?axis=${encodeURIComponent(tag)}`,
  swap: (id: number) => `/swaps/${id}`,
  places: () => '/places',
  placesList: () => '/places?list',
  units: () => '/units',
  nameplates: () => '/nameplates',
  nameplate: (id: number) => `/nameplates/${id}`,
  rules: () => '/rules',
  people: () => '/people',
  letters: () => '/letters',
  me: () => '/me',
  format: () => '/format',
  interface: () => '/interface',
  /** With a rule: where the page tells of it. */
  help: (rule?: string) => rule === undefined ? '/help' : `/help#${rule}`,
}

/** Only an address of this application is gone back to after signing in. */
export function safeBack(wanted: unknown): string {
  return typeof wanted === 'string' && /^\/(?![/\\])/.test(wanted) && !wanted.startsWith('/sign-in') ? wanted : addressOf.board()
}
