import type { Handlers } from '../platform/http/context'
import { asAcademy } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { addArea, addVenue, changeArea, changeVenue, readVenues } from './venues'

export function venueHandlers(services: Services): Handlers {
  return {
    'venues.list': (_input, context) => readVenues(services, asAcademy(context).academyId),
    'venues.add': ({ body }, context) =>
      addVenue(services, { academyId: asAcademy(context).academyId, wanted: body }),
    'venues.change': ({ params, body }, context) =>
      changeVenue(services, { academyId: asAcademy(context).academyId, ...params, change: body }),
    'areas.add': ({ params, body }, context) =>
      addArea(services, { academyId: asAcademy(context).academyId, ...params, area: body }),
    'areas.change': ({ params, body }, context) =>
      changeArea(services, { academyId: asAcademy(context).academyId, ...params, change: body }),
  }
}
