import { defineEventHandler, getRequestURL, setResponseHeader } from 'h3'
import { ROUTES } from '#shared/schemas/routes'
import { Fault } from '#shared/types/fault'

/** What no route answers: without this, an unknown address of the API would be drawn as a page. */
export default defineEventHandler((event) => {
  const { pathname } = getRequestURL(event)
  const others = Object.values(ROUTES).filter(route => patternOf(route.path).test(pathname)).map(route => route.method)
  if (others.length === 0) throw new Fault('notFound', 'There is nothing under this address.')
  setResponseHeader(event, 'allow', others.join(', '))
  throw new Fault('methodNotAllowed', 'This address does not take that method.')
})

function patternOf(path: string): RegExp {
  return new RegExp(`^${path.replaceAll('.', '\\.').replace(/\{\w+\}/g, '[^/]+')}/?$`)
}
