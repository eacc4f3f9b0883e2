import type { Answer, Sent } from '@marram/contract'

export type Venue = Answer<'venues.list'>['venues'][number]
export type Area = Venue['areas'][number]
export type AreaKind = Area['kind']
export type AreaBody = Sent<'areas.add', 'body'>

/** What an area is called, and what it usually has; every word can be changed. */
export const AREA_KINDS: readonly {
  value: AreaKind
  label: string
  name: string
  units: number
  hasLamps: boolean
  isCovered: boolean
}[] = [
  {
    value: 'range',
    label: 'a range',
    name: 'Range bays',
    units: 12,
    hasLamps: true,
    isCovered: true,
  },
  {
    value: 'short-game',
    label: 'a short-game area',
    name: 'Short-game area',
    units: 1,
    hasLamps: false,
    isCovered: false,
  },
  {
    value: 'putting',
    label: 'a putting green',
    name: 'Putting green',
    units: 1,
    hasLamps: false,
    isCovered: false,
  },
  {
    value: 'indoor',
    label: 'an indoor studio',
    name: 'Indoor studio',
    units: 2,
    hasLamps: true,
    isCovered: true,
  },
]

export function lightOf({ kind, hasLamps }: Pick<Area, 'kind' | 'hasLamps'>): string {
  if (kind === 'indoor') return 'Indoors'
  return hasLamps ? 'Lamps' : 'No lamps'
}

/** An area as one of its kind usually is. */
export function usualArea(kind: AreaKind): AreaBody {
  const found = AREA_KINDS.find(({ value }) => value === kind)
  return {
    name: found?.name ?? '',
    kind,
    units: found?.units ?? 1,
    hasLamps: found?.hasLamps ?? false,
    isCovered: found?.isCovered ?? false,
  }
}
