import type { Dictionary } from './nameplate'
import type { SettingsFile } from './types'

/**
 * The file with those of its extra keys set apart that the model's dictionary calls readings: they are kept with the
 * upload and are no part of content. The same file where there are none; a second time changes nothing.
 */
export function withoutReadings(file: SettingsFile, dictionary: Dictionary = {}): SettingsFile {
  const isReading = (key: string) => Object.hasOwn(dictionary, key) && dictionary[key]?.reading === true
  const entries = Object.entries(file.extra)
  if (!entries.some(([key]) => isReading(key))) return file
  return {
    ...file,
    extra: Object.fromEntries(entries.filter(([key]) => !isReading(key))),
    readings: { ...file.readings, ...Object.fromEntries(entries.filter(([key]) => isReading(key))) },
  }
}
