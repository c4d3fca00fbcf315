/** An answer that is either a value or a list of everything that was wrong; never both. */
export type Result<Value, Failure>
  = | { readonly ok: true, readonly value: Value }
    | { readonly ok: false, readonly errors: readonly Failure[] }

/** A hash function handed in by the caller: `shared/` has neither Node's crypto nor the browser's. Answers 32 bytes. */
export type Sha256 = (bytes: Uint8Array) => Uint8Array
