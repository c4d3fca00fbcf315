/** Ends the session in the vault, then on this page; a session already ended is as good. */
export function useSignOut(): () => Promise<void> {
  const api = useApi()
  const session = useSession()
  return async () => {
    try {
      await api.post('/api/sign-out')
    }
    catch (failure) {
      if (toProblem(failure).problem.status !== 401) throw failure
    }
    session.forget()
    await navigateTo(addressOf.signIn())
  }
}
