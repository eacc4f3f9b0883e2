import type { Answer } from '@marram/contract'
import { routeQuery } from '../api/query'

export type OwnGolfer = Answer<'golfers.mine'>['golfers'][number]

/** The person and those they look after here. */
export const myGolfersQuery = (academy: string) => routeQuery('golfers.mine', { academy })
export const golfersQuery = (academy: string, search: string) =>
  routeQuery('golfers.list', { academy, query: search ? { search } : {} })
export const golferQuery = (academy: string, golferId: string) =>
  routeQuery('golfers.read', { academy, params: { golferId } })
