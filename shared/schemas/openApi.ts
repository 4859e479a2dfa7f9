import { z } from 'zod'
import { PROBLEMS } from '../types/problem'
import type { RouteShape } from './route'

const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: z.enum(Object.keys(PROBLEMS)),
  errors: z.array(z.object({ field: z.string(), message: z.string(), line: z.int().optional() })),
  current: z.unknown().optional(),
})

type Json = Record<string, unknown>

/** The OpenAPI 3.1 document of a list of routes, made from the schemas that the handlers themselves read with. */
export function openApiOf(routes: readonly RouteShape[], { version, origin }: { version: string, origin: string }): Json {
  const paths: Record<string, Json> = {}
  for (const route of routes) {
    const path = paths[route.path] ??= {}
    path[route.method.toLowerCase()] = operationOf(route)
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Undercroft', version, description: 'Cellar operations of a brewery whose vessels are never emptied.' },
    servers: [{ url: origin }],
    paths,
    components: {
      schemas: { Problem: jsonSchema(Problem, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: origin.startsWith('https:') ? '__Host-undercroft' : 'undercroft' } },
    },
  }
}

function operationOf(route: RouteShape): Json {
  const signedIn = route.access !== 'public'
  return {
    summary: route.summary,
    ...(typeof route.access === 'object' && { 'x-ability': route.access.ability }),
    security: signedIn ? [{ session: [] }] : [],
    parameters: [...parametersOf(route.params, 'path'), ...parametersOf(route.query, 'query')],
    ...(route.body && { requestBody: { required: !route.body.safeParse(undefined).success, content: { 'application/json': { schema: jsonSchema(route.body, 'input') } } } }),
    ...(route.text && { requestBody: { required: true, content: { [route.text]: { schema: { type: 'string' } } } } }),
    responses: {
      ...Object.fromEntries(Object.entries(route.answers).map(([status, { describes, schema, type }]) => [status, {
        description: describes,
        ...(type && { content: { [type]: { schema: { type: 'string' } } } }),
        ...(schema && { content: { 'application/json': { schema: jsonSchema(schema, 'output') } } }),
      }])),
      default: { description: 'It was not done, and why.', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } },
    },
  }
}

function parametersOf(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!(schema instanceof z.ZodObject)) return []
  const fields: Record<string, z.ZodType> = schema.shape
  return Object.entries(fields).map(([name, field]) => ({
    name,
    in: place,
    required: place === 'path' || !field.safeParse(undefined).success,
    schema: jsonSchema(field, 'input'),
  }))
}

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, target: 'draft-2020-12', unrepresentable: 'any' })
  return rest
}
