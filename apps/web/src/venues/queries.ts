import { routeQuery } from '../api/query'

export const venuesQuery = (academy: string) => routeQuery('venues.list', { academy })
