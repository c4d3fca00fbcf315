type Query = Readonly<Record<string, string | number | boolean | undefined>>

interface ReadOptions { readonly query?: Query, readonly signal?: AbortSignal }
interface SendOptions extends ReadOptions {
  /** An Idempotency-Key: the same key on a second try is the same request. Make it with newRequestKey() before the first try. */
  readonly key?: string
  readonly headers?: Readonly<Record<string, string>>
}
interface Call extends SendOptions { readonly method: 'GET' | 'POST' | 'PATCH', readonly body?: unknown, readonly responseType?: 'blob' }

/** A key nobody else makes; works on plain http too, where crypto.randomUUID is missing. */
export function newRequestKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), byte => byte.toString(16).padStart(2, '0')).join('')
}

/** Calls of the interface; every failure is thrown as an ApiProblem. Without a session it leads to /sign-in and back. */
export function useApi() {
  const session = useSession()
  const router = useRouter()
  const request = $fetch as (path: string, options: Record<string, unknown>) => Promise<unknown>

  async function call<Answer>(path: string, { key, headers, ...rest }: Call): Promise<Answer> {
    try {
      return await request(path, { ...rest, retry: 0, headers: { accept: 'application/json', ...headers, ...(key ? { 'idempotency-key': key } : {}) } }) as Answer
    }
    catch (failure) {
      const problem = toProblem(failure)
      if (problem.problem.status === 401 && router.currentRoute.value.path !== '/sign-in') {
        session.forget()
        await router.push(addressOf.signIn(router.currentRoute.value.fullPath))
      }
      throw problem
    }
  }

  return {
    get: <Answer>(path: string, options: ReadOptions = {}) => call<Answer>(path, { ...options, method: 'GET' }),
    post: <Answer>(path: string, body?: unknown, options: SendOptions = {}) => call<Answer>(path, { ...options, method: 'POST', body }),
    patch: <Answer>(path: string, body: unknown, options: SendOptions = {}) => call<Answer>(path, { ...options, method: 'PATCH', body }),
    file: (path: string, body?: unknown, options: SendOptions = {}) => call<Blob>(path, { ...options, method: body === undefined ? 'GET' : 'POST', body, responseType: 'blob' }),
  }
}
