import { readFileSync } from 'node:fs'

/*
 * The walls of the house: who may import whom. DEVELOPERS.md tells them in words; tests/unit/walls.test.ts breaks each.
 *
 * An import is caught by its source. A name that Nuxt or Nitro imports by itself has none, so the names are read from the
 * declarations that `nuxt prepare` writes, and used as globals they are caught too.
 */

const namesIn = file => [...readFileSync(new URL(`./.nuxt/types/${file}`, import.meta.url), 'utf8').matchAll(/^\s*const (\w+):/gm)].map(([, name]) => name)
const serverNames = namesIn('nitro-imports.d.ts')
const faceNames = namesIn('imports.d.ts')

// What every script language has is nobody's import.
const banned = (names, message) => ['error', ...[...new Set(names)].map(name => ({ name, message }))]

const SERVER = '^#server|(^|/)server(/|$)'
const DATABASE = '(^#server/|(^|/))database(/|$)|^drizzle-orm|^pg(-boss)?$'
const COMMANDS = '(^#server/|(^|/))commands(/|$)'
const HTTP = '^(h3|nitropack|nuxt|#imports|#app|#build|ofetch)(/|$)|(^#server/|(^|/))(utils|api)(/|$)|^nuxt-auth-utils'
const FACE = '^(vue|vue-router|pinia|@vue|@nuxt)(/|$)|(^|/|^~/|^@/)(components|composables|stores|layouts|pages|emails)(/|$)'
const NODE = '^node:'
const ASIDE = '(^|/)(dev|scripts|tests)(/|$)'

const deny = (message, ...sources) => ({ regex: sources.join('|'), message })
/** The same, but a type may be named. */
const denyValues = (message, ...sources) => ({ ...deny(message, ...sources), allowTypeImports: true })

const imports = (...patterns) => ['error', { patterns }]

const CLOCK = [
  { selector: 'MemberExpression[object.name="Date"][property.name="now"]', message: 'The time comes in as an argument.' },
  { selector: 'NewExpression[callee.name="Date"][arguments.length=0]', message: 'The time comes in as an argument.' },
  { selector: 'MemberExpression[object.name="Math"][property.name="random"]', message: 'Chance comes in as an argument.' },
  { selector: 'MemberExpression[object.property.name="Now"], MemberExpression[object.name="Temporal"][property.name="Now"]', message: 'The time comes in as an argument.' },
]
const POOL = { selector: 'MemberExpression[property.name="pool"]', message: 'Only the doors in server/database/door.ts take a connection.' }
const ENVIRONMENT = { selector: 'MemberExpression[object.name="process"][property.name="env"]', message: 'The environment is read in server/utils/settings.ts, once.' }
// A dynamic import has a source too, and `import()` of a path goes round the rule for static ones.
const dynamic = (message, ...sources) => ({ selector: `ImportExpression[source.value=/${sources.join('|').replaceAll('/', '\\u002F')}/]`, message })

const face = ['app.vue', 'error.vue', '{pages,layouts,components,composables,stores,middleware,plugins}/**/*.{ts,vue}']
const fetching = ['useFetch', 'useLazyFetch', 'useAsyncData', 'useLazyAsyncData', '$fetch', 'useRequestFetch', 'fetch', 'useApi']

export const walls = [
  {
    name: 'walls/shared',
    files: ['shared/**/*.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('shared/ stands alone.', SERVER, DATABASE, HTTP, FACE, NODE, ASIDE)),
      'no-restricted-globals': banned([...serverNames, ...faceNames, 'process', 'fetch', 'window', 'document', 'localStorage'], 'shared/ is pure: no I/O, no framework.'),
      'no-restricted-syntax': ['error', ...CLOCK, dynamic('shared/ stands alone.', SERVER, FACE, NODE)],
    },
  },
  {
    name: 'walls/core',
    files: ['shared/{cellar,brewing}/**/*.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(
        deny('The core stands alone: shared/brewing, rrule and the date library, nothing else.', SERVER, DATABASE, HTTP, FACE, NODE, ASIDE, '^zod', '(^|/)schemas(/|$)', '^uuid'),
      ),
    },
  },
  {
    name: 'walls/edge',
    files: ['server/{api,tasks,middleware,routes}/**/*.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('The edge calls commands; it knows neither tables nor pages.', DATABASE, FACE, ASIDE)),
      'no-restricted-globals': banned(['useDatabase'], 'The handlers open the transaction.'),
      'no-restricted-syntax': ['error', POOL, ENVIRONMENT, ...CLOCK, dynamic('The edge calls commands.', DATABASE)],
    },
  },
  {
    name: 'walls/commands',
    files: ['server/{commands,presenters,security,ledgerFile}/**/*.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('Commands know nothing of HTTP or of pages.', HTTP, FACE, ASIDE)),
      'no-restricted-globals': banned([...serverNames, ...faceNames, 'fetch'], 'Commands know nothing of HTTP: what they need comes in as an argument.'),
      'no-restricted-syntax': ['error', POOL, ENVIRONMENT, ...CLOCK.slice(0, 2), dynamic('Commands know nothing of HTTP or of pages.', HTTP, FACE)],
    },
  },
  {
    name: 'walls/database',
    files: ['server/database/**/*.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('The database knows nothing above it.', HTTP, FACE, COMMANDS, ASIDE)),
      'no-restricted-globals': banned([...serverNames, ...faceNames, 'fetch'], 'The database knows nothing above it.'),
      'no-restricted-syntax': ['error', ENVIRONMENT, POOL, ...CLOCK],
    },
  },
  {
    name: 'walls/door',
    files: ['server/database/{door,client}.ts'],
    rules: { 'no-restricted-syntax': ['error', ENVIRONMENT, ...CLOCK] },
  },
  {
    name: 'walls/server',
    files: ['server/{utils,plugins,mail}/**/*.ts', 'server/error.ts'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('The server knows no pages, and nothing that is only for developing.', '^(vue-router|pinia|@vue|@nuxt)(/|$)', '(^|/|^~/|^@/)(components|composables|stores|layouts|pages)(/|$)', ASIDE)),
    },
  },
  {
    name: 'walls/environment',
    files: ['server/{utils,plugins,mail,solver}/**/*.ts', 'dev/**/*.ts'],
    ignores: ['server/utils/settings.ts'],
    rules: { 'no-restricted-syntax': ['error', POOL, ENVIRONMENT] },
  },
  {
    name: 'walls/face',
    files: face,
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(
        deny('The face knows the API, never the server.', SERVER, DATABASE, COMMANDS, NODE, ASIDE, '(^|/)emails(/|$)', '^(h3|nitropack)(/|$)'),
        denyValues('zod does not go to the browser: take the type, the server says what is wrong.', '^zod', '^#shared/schemas'),
      ),
      'no-restricted-syntax': ['error', dynamic('The face knows the API, never the server.', SERVER, NODE)],
    },
  },
  {
    name: 'walls/fetching',
    files: ['app.vue', 'error.vue', '{pages,layouts,components,stores}/**/*.{ts,vue}'],
    rules: {
      'no-restricted-globals': banned(fetching, 'Only composables ask the API.'),
    },
  },
  {
    name: 'walls/emails',
    files: ['emails/**/*.{ts,vue}'],
    rules: {
      '@typescript-eslint/no-restricted-imports': imports(deny('A mail is drawn from what it is handed.', SERVER, DATABASE, HTTP, NODE, ASIDE)),
      'no-restricted-globals': banned([...fetching, 'process'], 'A mail is drawn from what it is handed.'),
    },
  },
]
