import { useMutation } from '@tanstack/react-query'
import type { Sent } from '@marram/contract'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'

/** Whether the golfer gives a place up, or the desk for them. */
export type GiverUp = 'golfer' | 'desk'

export const giveUpQuoteQuery = (academy: string, enrolmentId: string, by: GiverUp) =>
  routeQuery(by === 'desk' ? 'checkout.quote-giving-up-for' : 'checkout.quote-giving-up', {
    academy,
    params: { enrolmentId },
  })
export const paymentsQuery = (academy: string) => routeQuery('payments.read', { academy })

/** Begins payment and leaves for the provider's page. */
export const useGoToPayment = (academy: string, enrolmentId: string) =>
  useMutation({
    mutationFn: () => call('checkout.start', { academy, params: { enrolmentId } }),
    onSuccess: ({ url }) => location.assign(url),
  })

export const usePayAtDesk = (academy: string, enrolmentId: string) =>
  useAcademyMutation(academy, (_: void) =>
    call('checkout.at-desk', { academy, params: { enrolmentId } }),
  )

export const useLetGo = (academy: string, enrolmentId: string) =>
  useAcademyMutation(academy, (_: void) =>
    call('enrolments.release', { academy, params: { enrolmentId } }),
  )

export const useGiveUp = (academy: string, enrolmentId: string, by: GiverUp) =>
  useAcademyMutation(academy, (body: Sent<'checkout.give-up', 'body'>) =>
    call(by === 'desk' ? 'checkout.give-up-for' : 'checkout.give-up', {
      academy,
      params: { enrolmentId },
      body,
    }),
  )

export const useTakeCash = (academy: string, enrolmentId: string) =>
  useAcademyMutation(academy, (body: Sent<'checkout.take-cash', 'body'>) =>
    call('checkout.take-cash', { academy, params: { enrolmentId }, body }),
  )

export const useChoose = (academy: string) =>
  useAcademyMutation(academy, (given: { placeId: string; choice: 'credit' | 'money' }) =>
    call('checkout.choose', {
      academy,
      params: { placeId: given.placeId },
      body: { choice: given.choice },
    }),
  )
