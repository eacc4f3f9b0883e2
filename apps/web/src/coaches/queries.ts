import { routeQuery } from '../api/query'

export const coachesQuery = (academy: string) => routeQuery('coaches.list', { academy })
