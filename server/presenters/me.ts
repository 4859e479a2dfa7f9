import { civilDateIn } from '#shared/cellar/civilDate'
import type { Me } from '#shared/schemas/auth'
import type { OwnBrewery } from '#server/database/queries/people'

/** Who is signed in, and where. `breweryId` is the brewery that the session is in, if any. */
export function presentMe(user: Me['user'], breweryId: string | null, breweries: OwnBrewery[], now: Date): Me {
  const current = breweries.find(brewery => brewery.id === breweryId)
  return {
    user: { id: user.id, name: user.name, email: user.email },
    brewery: current ? { id: current.id, name: current.name, timeZone: current.timeZone, today: civilDateIn(current.timeZone, now.getTime()) } : null,
    role: current?.role ?? null,
    breweries: breweries.map(({ id, name, role }) => ({ id, name, role })),
  }
}
