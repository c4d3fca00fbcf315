/** Whether two values of JSON say the same, whatever the order of their keys: whether they have one canonical form. undefined is no value of JSON and the same as itself alone. */
export function isSameJson(one: unknown, other: unknown): boolean {
  if (one === other) return true
  if (typeof one !== 'object' || typeof other !== 'object' || one === null || other === null) return false
  if (Array.isArray(one) || Array.isArray(other)) {
    return Array.isArray(one) && Array.isArray(other) && one.length === other.length && one.every((each, index) => isSameJson(each, other[index]))
  }
  const [a, b] = [one as Readonly<Record<string, unknown>>, other as Readonly<Record<string, unknown>>]
  const keys = Object.keys(a)
  return keys.length === Object.keys(b).length && keys.every(key => Object.hasOwn(b, key) && isSameJson(a[key], b[key]))
}
