import type { Answer } from '@marram/contract'
import { routeQuery } from '../api/query'

export type Academy = Answer<'academies.read'>

export const academyQuery = (academy: string) => routeQuery('academies.read', { academy })
export const staffQuery = (academy: string) => routeQuery('staff.list', { academy })
export const venuesQuery = (academy: string) => routeQuery('venues.list', { academy })
export const coachesQuery = (academy: string) => routeQuery('coaches.list', { academy })
