import type { Answer } from '@marram/contract'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { call } from '../api/client'
import { routeQuery } from '../api/query'
import { markOf, withMark, withoutMark } from './day-marks'

export type Day = Answer<'register.day'>
export type Register = Answer<'register.read'>
export type RegisterRow = Register['rows'][number]
export type SetMark = NonNullable<RegisterRow['mark']>

export type CardRow = Answer<'register.card'>['rows'][number]

export const cardQuery = (academy: string, clinicId: string) =>
  routeQuery('register.card', { academy, params: { clinicId } })
export const dayQuery = (academy: string, date: string) =>
  routeQuery('register.day', { academy, params: { date } })

interface Press {
  sessionId: string
  placeId: string
  mark: SetMark | null
}

/** Sets a mark: drawn at once, and taken off its row again when it could not be kept. */
export function useMarkPlace(academy: string, date: string) {
  const client = useQueryClient()
  const { queryKey } = dayQuery(academy, date)
  const mutationKey = [academy, 'register.mark']
  return useMutation({
    mutationKey,
    mutationFn: ({ sessionId, placeId, mark }: Press) =>
      call('register.mark', {
        academy,
        params: { sessionId, placeId },
        body: { mark, markedAt: new Date(Date.now()).toISOString() },
      }),
    onMutate: async ({ placeId, mark }) => {
      await client.cancelQueries({ queryKey })
      const day = client.getQueryData(queryKey)
      if (day) client.setQueryData(queryKey, withMark(day, { placeId, mark }))
      return { placeId, mark, before: day ? markOf(day, placeId) : null }
    },
    onError: (_error, _press, drawn) => {
      if (!drawn) return
      client.setQueryData(queryKey, (day: Day | undefined) => day && withoutMark(day, drawn))
    },
    onSettled: () => {
      // The day is asked anew after the last of several presses: between two, its answer would not
      // have the second yet, and would take that mark off the page for a moment.
      if (client.isMutating({ mutationKey }) > 1) return
      void client.invalidateQueries({ queryKey })
      void client.invalidateQueries({ queryKey: [academy, 'register.card'] })
    },
  })
}

/** Closes a register, or opens it again; the whole academy's answers follow. */
export function useCloseRegister(academy: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (given: { sessionId: string; revision: number; isClosing: boolean }) =>
      call(given.isClosing ? 'register.close' : 'register.reopen', {
        academy,
        params: { sessionId: given.sessionId },
        body: { revision: given.revision },
      }),
    onSettled: () => client.invalidateQueries({ queryKey: [academy] }),
  })
}
