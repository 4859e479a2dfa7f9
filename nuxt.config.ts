import { version } from './package.json'

export default defineNuxtConfig({
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils'],
  devtools: { enabled: false },

  app: {
    head: {
      htmlAttrs: { lang: 'en-GB' },
      meta: [{ name: 'viewport', content: 'width=device-width, initial-scale=1' }],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/favicon.svg' }],
    },
  },
  css: ['~/assets/css/fonts.css', '~/assets/css/main.css'],

  router: { options: { sensitive: true } },
  runtimeConfig: { public: { version } },
  // A flat root: without this line a folder named `app` would silently become the source folder.
  srcDir: '.',
  ignore: ['tests/**', 'scripts/**', 'dev/**', 'emails/**'],
  sourcemap: false,
  future: { compatibilityVersion: 4 },
  features: { inlineStyles: false },
  experimental: {
    // Nothing here is cached or prerendered, and a page of one person is never another's: see the security notes in DEVELOPERS.md.
    payloadExtraction: false,
    appManifest: false,
    componentIslands: false,
  },
  compatibilityDate: '2026-07-01',

  nitro: {
    experimental: { tasks: true },
    compressPublicAssets: { gzip: true, brotli: true },
    typescript: { strict: true },
  },

  typescript: {
    strict: true,
    tsConfig: {
      include: ['../tests/**/*', '../scripts/**/*', '../dev/**/*', '../emails/**/*', '../*.config.ts'],
      compilerOptions: { noUncheckedIndexedAccess: true, noImplicitOverride: true, noUnusedLocals: true, noUnusedParameters: true },
    },
  },
  telemetry: false,
  hooks: {
    'nitro:config'(config) {
      config.handlers = config.handlers?.filter(handler => !handler?.route?.startsWith('/api/_auth'))
      const pages = config.errorHandler
      config.errorHandler = ['~/server/error.ts', ...(Array.isArray(pages) ? pages : pages ? [pages] : [])]
    },
  },

  // The session's row and its cookie are our own (server/utils/session.ts); the module's public session route is taken off below.
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: true, standalone: true } },
  tailwindcss: { cssPath: false, configPath: 'tailwind.config.ts', viewer: false },
})
