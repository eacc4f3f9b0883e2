import { paths } from '../paths'
import type { Membership, Session } from './queries'

/** Where a person starts in an academy: with what their widest role does there every day. */
export function homeIn(academy: string, roles: Membership['roles']): string {
  if (roles.includes('owner') || roles.includes('desk')) return paths.week(academy)
  if (roles.includes('coach')) return paths.today(academy)
  return roles.includes('bookkeeper') ? paths.money(academy) : paths.my(academy)
}

/** Where a person starts: in the first academy they belong to. */
export function homeOf({ memberships }: Pick<Session, 'memberships'>): string {
  const [first] = memberships
  return first ? homeIn(first.academy.slug, first.roles) : paths.home()
}
