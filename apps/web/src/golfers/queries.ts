import type { Answer, Sent } from '@marram/contract'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'

export type OwnGolfer = Answer<'golfers.mine'>['golfers'][number]
export type GolferInList = Answer<'golfers.list'>['golfers'][number]
export type Golfer = Answer<'golfers.read'>

/** The person and those they look after here. */
export const myGolfersQuery = (academy: string) => routeQuery('golfers.mine', { academy })
export const golfersQuery = (academy: string, search: string) =>
  routeQuery('golfers.list', { academy, query: search ? { search } : {} })
export const golferQuery = (academy: string, golferId: string) =>
  routeQuery('golfers.read', { academy, params: { golferId } })

export const useEnterGolfer = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'golfers.enter', 'body'>) =>
    call('golfers.enter', { academy, body }),
  )

export const useAddDependant = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'golfers.add-dependant', 'body'>) =>
    call('golfers.add-dependant', { academy, body }),
  )
