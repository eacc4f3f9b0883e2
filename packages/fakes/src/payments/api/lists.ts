import { ProviderError, missing } from '../provider-error'
import type { Asked } from './asked'
import { integerAt, textAt } from './form-body'

export interface Listed {
  id: string
  created: number
}

export interface ListPage {
  object: 'list'
  url: string
  has_more: boolean
  data: object[]
}

const DEFAULT_LIMIT = 10
const MOST = 100
export const PAGE_PARAMS = ['limit', 'starting_after', 'ending_before', 'created'] as const

/**
 * One page of a list, newest first: `limit` records after `starting_after`, or before
 * `ending_before`, of those created within `created`.
 */
export function listPage<T extends Listed>(
  asked: Asked,
  given: { url: string; records: readonly T[]; show: (record: T) => object },
): ListPage {
  const { query } = asked
  const limit = integerAt(query, 'limit') ?? DEFAULT_LIMIT
  if (limit < 1 || limit > MOST) {
    throw new ProviderError(400, `This value must be from 1 to ${MOST}.`, { param: 'limit' })
  }
  const after = textAt(query, 'starting_after')
  const before = textAt(query, 'ending_before')
  if (after && before) {
    throw new ProviderError(400, 'You may only specify one of these: starting_after, ending_before')
  }
  const records = newestFirst(given.records.filter(isWithin(asked)))
  const indexOf = (id: string) => {
    const index = records.findIndex((record) => record.id === id)
    if (index < 0) throw missing('record', id)
    return index
  }
  const end = before ? indexOf(before) : records.length
  const start = before ? Math.max(0, end - limit) : after ? indexOf(after) + 1 : 0
  const data = records.slice(start, Math.min(end, start + limit))
  const hasMore = before ? start > 0 : start + limit < end
  return { object: 'list', url: given.url, has_more: hasMore, data: data.map(given.show) }
}

/** Records come in the order they were made in; of two of one second the later made goes first. */
function newestFirst<T extends Listed>(records: readonly T[]): T[] {
  return [...records].reverse().sort((left, right) => right.created - left.created)
}

function isWithin({ query }: Asked): (record: Listed) => boolean {
  const exact = typeof query['created'] === 'string' ? integerAt(query, 'created') : undefined
  const bound = (name: string) => integerAt(query, 'created', name)
  const [gt, gte, lt, lte] = ['gt', 'gte', 'lt', 'lte'].map(bound)
  return ({ created }) =>
    (exact === undefined || created === exact) &&
    (gt === undefined || created > gt) &&
    (gte === undefined || created >= gte) &&
    (lt === undefined || created < lt) &&
    (lte === undefined || created <= lte)
}
