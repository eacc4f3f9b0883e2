import { paths } from '../paths'
import type { Session } from './queries'

/** Where a person starts: the desk for staff, their golf for golfers. */
export function homeOf({ memberships }: Session): string {
  const [first] = memberships
  if (!first) return paths.home()
  const { slug } = first.academy
  if (first.roles.includes('bookkeeper') && first.roles.length === 1) return paths.money(slug)
  const isCoachOnly = first.roles.includes('coach') && !first.roles.includes('owner')
  if (isCoachOnly) return paths.today(slug)
  return first.roles.some((role) => role !== 'golfer') ? paths.week(slug) : paths.my(slug)
}
