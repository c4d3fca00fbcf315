const hour = 60 * 60_000

/** Since when an upload is overdue; null where none is due, or the axis was never read (which is told apart). */
export function overdueSince(lastUploadAt: string | null, everyHours: number | null, now: string): string | null {
  if (lastUploadAt === null || everyHours === null) return null
  const due = new Date(Date.parse(lastUploadAt) + everyHours * hour).toISOString()
  return due < now ? due : null
}
