import type { Answer, Sent } from '@marram/contract'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'

export type Academy = Answer<'academies.read'>
export type AcademySettings = Sent<'academies.change', 'body'>
export type Staff = Answer<'staff.list'>

export const publishedQuery = () => routeQuery('academies.published', {})
/** Whether an address is free, and how it is written. */
export const checkSlugQuery = (slug: string) =>
  routeQuery('academies.check-slug', { params: { slug } })
export const academyQuery = (academy: string) => routeQuery('academies.read', { academy })
export const staffQuery = (academy: string) => routeQuery('staff.list', { academy })

export const useChangeAcademy = (academy: string) =>
  useAcademyMutation(academy, (body: AcademySettings) =>
    call('academies.change', { academy, body }),
  )

export const usePublishAcademy = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'academies.publish', 'body'>) =>
    call('academies.publish', { academy, body }),
  )

export const useInvite = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'invitations.send', 'body'>) =>
    call('invitations.send', { academy, body }),
  )

export const useWithdrawInvitation = (academy: string) =>
  useAcademyMutation(academy, (params: Sent<'invitations.withdraw', 'params'>) =>
    call('invitations.withdraw', { academy, params }),
  )

export const useRemoveStaff = (academy: string) =>
  useAcademyMutation(academy, (params: Sent<'staff.remove', 'params'>) =>
    call('staff.remove', { academy, params }),
  )
