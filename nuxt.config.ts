export default defineNuxtConfig({ srcDir: '.', ssr: false, compatibilityDate: '2026-12-01', telemetry: false })
