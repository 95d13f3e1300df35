const strict = {
  compilerOptions: {
    strict: true,
    noUncheckedIndexedAccess: true,
    verbatimModuleSyntax: true,
    noImplicitOverride: true,
  },
}

/** A second copy of the application (tests beside a running one) builds into a folder of its own. */
const outputDir = process.env.BAYWRIGHT_OUTPUT_DIR
const buildDir = process.env.BAYWRIGHT_BUILD_DIR

export default defineNuxtConfig({
  modules: ['@pinia/nuxt', '@nuxtjs/tailwindcss', '@vueuse/nuxt', 'nuxt-auth-utils', '@nuxt/eslint'],
  components: [{ path: '~/components', pathPrefix: false }],
  devtools: { enabled: false },
  app: {
    head: {
      htmlAttrs: { lang: 'en-GB' },
      titleTemplate: '%s · Baywright',
      title: 'Steel grids at scheme stage',
      meta: [{ name: 'viewport', content: 'width=device-width, initial-scale=1' }],
    },
  },
  css: ['~/assets/css/fonts.css'],
  runtimeConfig: {
    session: {
      name: 'baywright',
      password: '',
      maxAge: 60 * 60 * 24 * 7,
      cookie: { secure: true, sameSite: 'lax', httpOnly: true },
    },
  },
  ...(buildDir ? { buildDir } : {}),
  compatibilityDate: '2026-11-01',
  nitro: {
    ...(outputDir ? { output: { dir: outputDir } } : {}),
    typescript: {
      tsConfig: { ...strict, include: ['../workers/**/*'] },
    },
  },
  vite: {
    build: {
      // A font or picture as a data: address would be blocked by the content security policy.
      assetsInlineLimit: 0,
    },
  },
  typescript: {
    strict: true,
    tsConfig: { ...strict, include: ['../tests/components/**/*'] },
    nodeTsConfig: {
      ...strict,
      compilerOptions: { ...strict.compilerOptions, paths: { '#shared/*': ['../shared/*'], '~~/*': ['../*'] } },
      include: ['../tests/**/*.ts', '../vitest.config.ts', '../tailwind.config.ts'],
      exclude: ['../tests/components/**/*'],
    },
    sharedTsConfig: strict,
  },
  telemetry: false,
  eslint: {
    config: {
      stylistic: {
        indent: 2,
        quotes: 'single',
        semi: false,
        braceStyle: '1tbs',
        commaDangle: 'always-multiline',
      },
    },
  },
  tailwindcss: { viewer: false, cssPath: '~/assets/css/tailwind.css' },
})
