import { ESLint } from 'eslint'
import { expect, it } from 'vitest'

const eslint = new ESLint({ cwd: new URL('../..', import.meta.url).pathname })

/** The rules that a file with this text would break, were it at this path. */
async function brokenBy(filePath: string, text: string): Promise<string[]> {
  const [result] = await eslint.lintText(`${text}\n`, { filePath })
  return (result?.messages ?? []).map(message => message.ruleId ?? message.message).filter(rule => rule.includes('no-restricted'))
}

const vue = (script: string) => `<script setup lang="ts">\n${script}\n</script>\n\n<template>\n  <p />\n</template>`

it.each([
  ['shared takes the server', 'shared/cellar/breach.ts', `import { openDatabase } from '#server/database/client'\n\nexport const x = openDatabase`],
  ['shared takes the server by a relative path', 'shared/schemas/breach.ts', `import { openDatabase } from '../../server/database/client'\n\nexport const x = openDatabase`],
  ['shared takes Vue', 'shared/cellar/breach.ts', `import { ref } from 'vue'\n\nexport const x = ref(1)`],
  ['shared takes Vue without an import', 'shared/cellar/breach.ts', 'export const x = ref(1)'],
  ['shared takes Nitro without an import', 'shared/cellar/breach.ts', 'export const x = useStorage()'],
  ['shared reads the clock', 'shared/cellar/breach.ts', 'export const x = () => Date.now()'],
  ['shared makes a date of now', 'shared/cellar/breach.ts', 'export const x = () => new Date()'],
  ['shared reads a file', 'shared/cellar/breach.ts', `import { readFileSync } from 'node:fs'\n\nexport const x = readFileSync`],
  ['shared imports the server on demand', 'shared/cellar/breach.ts', `export const x = () => import('#server/database/client')`],
  ['the core takes zod', 'shared/cellar/breach.ts', `import { z } from 'zod'\n\nexport const x = z`],
  ['the core takes a schema', 'shared/brewing/breach.ts', `import { VesselView } from '../schemas/vessel'\n\nexport const x = VesselView`],
  ['a route takes the database', 'server/api/breach.get.ts', `import { openDatabase } from '#server/database/client'\n\nexport default openDatabase`],
  ['a route takes a query', 'server/api/breach.get.ts', `import { vesselsInWalkingOrder } from '../database/queries/vessels'\n\nexport default vesselsInWalkingOrder`],
  ['a route writes SQL', 'server/api/breach.get.ts', `import { sql } from 'drizzle-orm'\n\nexport default sql`],
  ['a route takes the database without an import', 'server/api/breach.get.ts', 'export default () => useDatabase()'],
  ['a task takes the database', 'server/tasks/breach.ts', `import { openDatabase } from '#server/database/client'\n\nexport default openDatabase`],
  ['a command takes h3', 'server/commands/breach.ts', `import { createError } from 'h3'\n\nexport const x = createError`],
  ['a command takes h3 without an import', 'server/commands/breach.ts', 'export const x = () => createError({ statusCode: 404 })'],
  ['a command takes a server util without an import', 'server/commands/breach.ts', 'export const x = () => useClock()'],
  ['a command takes a server util', 'server/commands/breach.ts', `import { useClock } from '../utils/clock'\n\nexport const x = useClock`],
  ['a command reads the clock', 'server/commands/breach.ts', 'export const x = () => new Date()'],
  ['a command takes a connection', 'server/commands/breach.ts', `import type { Database } from '#server/database/client'\n\nexport const x = (database: Database) => database.pool.query('select 1')`],
  ['a reader of files takes h3', 'server/ledgerFile/breach.ts', `import { createError } from 'h3'\n\nexport const x = createError`],
  ['a query takes a command', 'server/database/queries/breach.ts', `import { signIn } from '#server/commands/signIn'\n\nexport const x = signIn`],
  ['a query takes a connection', 'server/database/queries/breach.ts', `import type { Database } from '../client'\n\nexport const x = (database: Database) => database.pool.query('select 1')`],
  ['a util reads the environment', 'server/utils/breach.ts', 'export const x = process.env.PORT'],
  ['a util takes a connection', 'server/utils/breach.ts', `export const x = () => useDatabase().pool.query('select 1')`],
  ['the server takes the demo', 'server/utils/breach.ts', `import { loadDemo } from '../../dev/loadDemo'\n\nexport const x = loadDemo`],
  ['a page takes the server', 'pages/breach.vue', vue(`import { openDatabase } from '#server/database/client'\n\nconsole.log(openDatabase)`)],
  ['a page takes the server by a relative path', 'pages/breach.vue', vue(`import { openDatabase } from '../server/database/client'\n\nconsole.log(openDatabase)`)],
  ['a page takes zod', 'pages/breach.vue', vue(`import { z } from 'zod'\n\nconsole.log(z)`)],
  ['a page runs a schema', 'pages/breach.vue', vue(`import { VesselCreate } from '#shared/schemas/vessel'\n\nconsole.log(VesselCreate)`)],
  ['a page fetches', 'pages/breach.vue', vue(`const { data } = await useFetch('/api/vessels')\nconsole.log(data)`)],
  ['a component fetches', 'components/app/AppBreach.vue', vue(`console.log(await $fetch('/api/vessels'))`)],
  ['a store fetches', 'stores/breach.ts', `export const x = () => $fetch('/api/vessels')`],
  ['a composable takes the database', 'composables/useBreach.ts', `import { openDatabase } from '~/server/database/client'\n\nexport const x = openDatabase`],
  ['a mail takes the server', 'emails/Breach.vue', vue(`import { openDatabase } from '../server/database/client'\n\nconsole.log(openDatabase)`)],
])('%s: caught', async (_, filePath, text) => {
  expect(await brokenBy(filePath, text)).not.toEqual([])
})

it.each([
  ['the core takes its own', 'shared/cellar/fine.ts', `import { addDays } from './civilDate'\n\nexport const x = addDays`],
  ['a route takes a command', 'server/api/fine.get.ts', `import { listVessels } from '#server/commands/listVessels'\n\nexport default listVessels`],
  ['a command takes a query', 'server/commands/fine.ts', `import { vesselsInWalkingOrder } from '#server/database/queries/vessels'\n\nexport const x = vesselsInWalkingOrder`],
  ['a page names the type of a schema', 'pages/fine.vue', vue(`import type { VesselView } from '#shared/schemas/vessel'\n\ndefineProps<{ vessel: VesselView }>()`)],
  ['a composable fetches', 'composables/useFine.ts', `export const useFine = () => useFetch('/api/vessels')`],
])('%s: let through', async (_, filePath, text) => {
  expect(await brokenBy(filePath, text)).toEqual([])
})
