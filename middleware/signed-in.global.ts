/** Leads to the sign-in page and back; a convenience, the vault decides on every call. */
export default defineNuxtRouteMiddleware(async (to) => {
  if (to.meta.open) return
  const session = useSession()
  try {
    if (await session.find()) return
  }
  catch {
    // Without reception the page itself says so and keeps what it has; the vault hands out nothing to nobody.
    return
  }
  return navigateTo(addressOf.signIn(to.fullPath), { replace: true })
})
