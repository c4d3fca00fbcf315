import { readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

const fontFiles = ['inter', 'jetbrains-mono'].flatMap((family) => {
  const folder = fileURLToPath(new URL(`./node_modules/@fontsource/${family}/files/`, import.meta.url))
  return readdirSync(folder).filter(name => /-(400|600)-normal\.woff$/.test(name)).map(name => folder + name)
})

/*
 * No component islands, no `.server.vue`, no authorisation in route rules or route middleware, no runtime compiler:
 * later fixes of the framework concern those features, and the application does without them (tests/architecture).
 */
export default defineNuxtConfig({
  modules: [
    '@nuxt/eslint',
    '@nuxtjs/tailwindcss',
    '@nuxtjs/color-mode',
    '@pinia/nuxt',
    '@vueuse/nuxt',
    'nuxt-auth-utils',
    'nuxt-security',
  ],
  // Without server rendering the development server of this version looks for an entry that only this path sets (nuxt/nuxt#35033).
  $development: { experimental: { viteEnvironmentApi: true } },
  // Everything stands behind sign-in, and a page once open must work on where there is no reception.
  ssr: false,
  devtools: { enabled: false },
  app: {
    head: {
      title: 'Witnessmark',
      htmlAttrs: { lang: 'en' },
      meta: [{ name: 'viewport', content: 'width=device-width, initial-scale=1' }, { name: 'color-scheme', content: 'light dark' }],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/favicon.svg' }],
    },
  },
  colorMode: { classSuffix: '', dataValue: 'theme', preference: 'system', fallback: 'light', storageKey: 'witnessmark-theme' },
  spaLoadingTemplate: 'spa-loading-template.html',
  // The sealed cookie holds a random session id and nothing else. Password and `secure` are set at the start (server/plugins/vault.ts).
  runtimeConfig: { session: { name: 'witnessmark', password: '', maxAge: 7 * 24 * 60 * 60, cookie: { sameSite: 'lax', secure: false } } },
  srcDir: '.',
  compatibilityDate: '2026-12-01',
  // The fonts of sheets and labels: read at run time, so that the bundler does not see them.
  // pdfkit brings an older @noble/hashes of its own: ours goes into the bundle, so that neither stands in the other's place.
  nitro: { esbuild: { options: { target: 'node20' } }, externals: { traceInclude: fontFiles, inline: ['@noble/hashes', '@noble/curves'] } },
  typescript: {
    tsConfig: { exclude: ['../tests/architecture', '../tests/crash', '../tests/e2e', '../tests/server', '../tests/support', '../tests/unit', '../fixtures', '../shared', '../bench', '../scripts', '../drizzle.config.ts', '../vitest.config.ts'] },
    sharedTsConfig: { include: ['../tests/unit/shared/**/*'] },
    strict: true,
  },
  telemetry: false,
  // Its own routes are taken out (modules/route-table.ts): who is signed in, GET /api/me says.
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: true } },
  security: {
    strict: true,
    // The origin rule of the route wrapper covers cross-site requests, scripts with a token included.
    csrf: false,
    // Measured to misbehave: CORS *, evaded by a forged header, refuses honest text, trusts Content-Length. Ours stand in the wrapper.
    corsHandler: false,
    rateLimiter: false,
    xssValidator: false,
    requestSizeLimiter: false,
    headers: {
      contentSecurityPolicy: {
        'default-src': ['\'self\''],
        'style-src': ['\'self\'', '\'nonce-{{nonce}}\''],
        'font-src': ['\'self\''],
        'img-src': ['\'self\'', 'data:', 'blob:'],
        'connect-src': ['\'self\''],
        'worker-src': ['\'self\''],
        'form-action': ['\'self\''],
        'frame-ancestors': ['\'none\''],
        // A plant's own network often has no certificate; PUBLIC_URL with https sets Secure cookies instead.
        'upgrade-insecure-requests': false,
      },
      strictTransportSecurity: false,
      // A swap reads the label of its axis by camera. web-share is no feature of desktop Chromium, which complains of its name.
      permissionsPolicy: { 'camera': ['self'], 'sync-xhr': [], 'web-share': false },
      crossOriginEmbedderPolicy: 'require-corp',
    },
  },
  tailwindcss: { cssPath: '~/assets/css/main.css', viewer: false },
})
