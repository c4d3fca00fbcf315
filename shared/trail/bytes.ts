/** Base 64 with padding (RFC 4648, section 4); `bytesOfBase64` is its inverse. */
export const toBase64 = (bytes: Uint8Array): string => btoa(String.fromCharCode(...bytes))

/** Null unless it is the one spelling that `toBase64` would give: padding in place, unused bits zero (RFC 4648, section 3.5). */
export function bytesOfBase64(text: string): Uint8Array | null {
  if (!/^(?:[A-Za-z0-9+/]{4})*(?:[A-Za-z0-9+/]{2}==|[A-Za-z0-9+/]{3}=)?$/.test(text)) return null
  const bytes = Uint8Array.from(atob(text), character => character.charCodeAt(0))
  return toBase64(bytes) === text ? bytes : null
}

/** Whether both are the same bytes. Not for secrets: the time it takes tells where they part. */
export const sameBytes = (a: Uint8Array, b: Uint8Array): boolean => a.length === b.length && a.every((byte, i) => byte === b[i])
