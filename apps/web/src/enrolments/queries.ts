import type { Answer, Sent } from '@marram/contract'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'

export type Enrolment = Answer<'enrolments.read'>
export type MyPlaces = Answer<'enrolments.mine'>
export type PlaceOfEnrolment = Enrolment['places'][number]

export const myPlacesQuery = (academy: string) => routeQuery('enrolments.mine', { academy })
export const enrolmentQuery = (academy: string, enrolmentId: string) =>
  routeQuery('enrolments.read', { academy, params: { enrolmentId } })
export const placesOfGolferQuery = (academy: string, golferId: string) =>
  routeQuery('enrolments.of-golfer', { academy, params: { golferId } })
export const placesOfClinicQuery = (academy: string, clinicId: string) =>
  routeQuery('enrolments.of-clinic', { academy, params: { clinicId } })

export const useHold = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'enrolments.hold', 'body'>) =>
    call('enrolments.hold', { academy, body }),
  )

export const useJoinWaitlist = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'waitlist.join', 'body'>) =>
    call('waitlist.join', { academy, body }),
  )

export const useLeaveWaitlist = (academy: string) =>
  useAcademyMutation(academy, (entryId: string) =>
    call('waitlist.leave', { academy, params: { entryId } }),
  )

export const useGivePlace = (academy: string) =>
  useAcademyMutation(academy, (body: Sent<'enrolments.give', 'body'>) =>
    call('enrolments.give', { academy, body }),
  )
