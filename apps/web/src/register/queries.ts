import type { Answer } from '@marram/contract'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { call } from '../api/client'
import { routeQuery } from '../api/query'

export type Day = Answer<'register.day'>
export type Register = Answer<'register.read'>
export type RegisterRow = Register['rows'][number]
export type SetMark = NonNullable<RegisterRow['mark']>

export const dayQuery = (academy: string, date: string) =>
  routeQuery('register.day', { academy, params: { date } })

export interface Press {
  sessionId: string
  placeId: string
  mark: SetMark | null
}

/** Sets a mark: drawn at once, put back with a sentence when it could not be kept. */
export function useMarkPlace(academy: string, date: string) {
  const client = useQueryClient()
  const { queryKey } = dayQuery(academy, date)
  return useMutation({
    mutationFn: ({ sessionId, placeId, mark }: Press) =>
      call('register.mark', {
        academy,
        params: { sessionId, placeId },
        body: { mark, markedAt: new Date(Date.now()).toISOString() },
      }),
    onMutate: async ({ placeId, mark }) => {
      await client.cancelQueries({ queryKey })
      const before = client.getQueryData(queryKey)
      client.setQueryData(queryKey, (day: Day | undefined) => day && withMark(day, placeId, mark))
      return { before }
    },
    onError: (_error, _press, context) => {
      if (context?.before) client.setQueryData(queryKey, context.before)
    },
  })
}

function withMark(day: Day, placeId: string, mark: SetMark | null): Day {
  return {
    ...day,
    registers: day.registers.map((register) => ({
      ...register,
      rows: register.rows.map((row) => (row.placeId === placeId ? { ...row, mark } : row)),
    })),
  }
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
