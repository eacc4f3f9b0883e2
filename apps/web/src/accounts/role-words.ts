import type { Role } from '@marram/contract/routes'

export type StaffRole = Exclude<Role, 'golfer'>

/** The roles of staff, as they are chosen and listed. */
export const ROLE_WORDS = [
  { value: 'desk', label: 'Front desk' },
  { value: 'coach', label: 'Coach' },
  { value: 'bookkeeper', label: 'Bookkeeper' },
  { value: 'owner', label: 'Owner' },
] as const satisfies readonly { value: StaffRole; label: string }[]

export const roleWord = (role: string): string =>
  ROLE_WORDS.find(({ value }) => value === role)?.label ?? role

const IN_ROLE: Record<StaffRole, string> = {
  desk: 'to the front desk',
  coach: 'as a coach',
  bookkeeper: 'as the bookkeeper',
  owner: 'as an owner',
}

/** "Fintan is invited as a coach." */
export const inRole = (role: StaffRole): string => IN_ROLE[role]
