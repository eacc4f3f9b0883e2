/** The roles of a person in one academy. */
export const ROLES = ['owner', 'desk', 'coach', 'golfer', 'bookkeeper'] as const
export type Role = (typeof ROLES)[number]

/** `all`: every row of the academy. `own`: only rows that belong to the person (see each feature). */
export type Scope = 'all' | 'own'

/**
 * Who may do what in an academy. This is the only place where it is written: the API enforces it
 * before a handler runs, the web reads it to show only what can be pressed.
 */
export const PERMISSIONS = {
  'academy:read': { owner: 'all', desk: 'all', coach: 'all', bookkeeper: 'all' },
  'academy:change': { owner: 'all' },
  'staff:manage': { owner: 'all' },
  'venues:read': { owner: 'all', desk: 'all', coach: 'all' },
  'venues:change': { owner: 'all', desk: 'all' },
  'coaches:read': { owner: 'all', desk: 'all', coach: 'all' },
  'coaches:change': { owner: 'all' },
  'clinics:titles': { owner: 'all', desk: 'all', coach: 'all', bookkeeper: 'all' },
  'clinics:read': { owner: 'all', desk: 'all', coach: 'all' },
  'clinics:write': { owner: 'all', desk: 'all' },
  'sessions:change': { owner: 'all', desk: 'all', coach: 'own' },
  'places:read': { owner: 'all', desk: 'all', coach: 'own' },
  'places:change': { owner: 'all', desk: 'all' },
  'places:own': { owner: 'own', desk: 'own', coach: 'own', golfer: 'own', bookkeeper: 'own' },
  'register:take': { owner: 'all', desk: 'all', coach: 'own' },
  'swings:record': { owner: 'all', coach: 'own' },
  'golfers:read': { owner: 'all', desk: 'all', coach: 'own' },
  'golfers:change': { owner: 'all', desk: 'all' },
  'minors:read': { owner: 'all', desk: 'all', coach: 'own' },
  'orders:take': { owner: 'all', desk: 'all' },
  'payments:connect': { owner: 'all' },
  'ledger:read': { owner: 'all', bookkeeper: 'all' },
} as const satisfies Record<string, Partial<Record<Role, Scope>>>

export type Permission = keyof typeof PERMISSIONS

/** The widest scope that any of the person's roles gives for a permission; null when none does. */
export function scopeOf(roles: readonly Role[], permission: Permission): Scope | null {
  const granted: Partial<Record<Role, Scope>> = PERMISSIONS[permission]
  const scopes = roles.map((role) => granted[role])
  if (scopes.includes('all')) return 'all'
  return scopes.includes('own') ? 'own' : null
}
