type Value = unknown

const isObject = (value: Value): value is Record<string, Value> => typeof value === 'object' && value !== null && !Array.isArray(value)

/** RFC 7396, section 2: null removes a member, objects merge member by member, everything else replaces. */
export function mergePatch(target: Value, patch: Value): Value {
  if (!isObject(patch)) return patch
  const merged: Record<string, Value> = isObject(target) ? { ...target } : {}
  for (const [key, value] of Object.entries(patch)) {
    if (value === null) Reflect.deleteProperty(merged, key)
    else if (value !== undefined) merged[key] = mergePatch(merged[key], value)
  }
  return merged
}
