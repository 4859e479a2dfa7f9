import type { z } from 'zod'
import type { Ability } from '../abilities'

/** Who may call a route: anybody; anybody signed in, whichever brewery; or a member whose role has the ability. */
export type Access = 'public' | 'signedIn' | { ability: Ability }

export interface Answer {
  describes: string
  schema?: z.ZodType
  /** The media type of an answer that is no JSON. */
  type?: 'text/csv'
}

/** All that is fixed about one route: the handler enforces it, the OpenAPI document tells it, the tests go through it. */
export interface RouteShape {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  /** As in OpenAPI: `/api/vessels/{id}`. */
  path: `/api/${string}`
  summary: string
  access: Access
  params?: z.ZodType
  query?: z.ZodType
  body?: z.ZodType
  /** Of a route that takes a file instead of JSON: its media type. It is read as a whole, as text. */
  text?: 'text/csv'
  answers: Record<number, Answer>
}

type TextOf<Type> = Type extends string ? string : undefined
type Output<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined

/** What a handler of this route is handed, as its schemas leave it. */
export interface RouteInput<R extends RouteShape> {
  params: Output<R['params']>
  query: Output<R['query']>
  body: Output<R['body']>
  /** Of a route that takes a file. */
  text: TextOf<R['text']>
}

/** Write a route down. Keeps the exact types of its schemas. */
export function route<const R extends RouteShape>(shape: R): R {
  return shape
}
