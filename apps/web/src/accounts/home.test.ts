import type { Role } from '@marram/contract/routes'
import { describe, expect, it } from 'vitest'
import { scopeOf } from '@marram/contract/routes'
import { homeIn, homeOf } from './home'

const CASES: [Role[], string][] = [
  [['owner'], '/dunes/desk/week'],
  [['desk', 'coach'], '/dunes/desk/week'],
  [['coach'], '/dunes/desk/today'],
  [['coach', 'golfer'], '/dunes/desk/today'],
  [['bookkeeper'], '/dunes/desk/money'],
  [['golfer', 'bookkeeper'], '/dunes/desk/money'],
  [['golfer'], '/dunes/my'],
  [[], '/dunes/my'],
]

describe('where a person starts', () => {
  it.each(CASES)('as %j is %s', (roles, home) => {
    expect(homeIn('dunes', roles)).toBe(home)
  })

  it.each(CASES)('as %j is a page that they may read', (roles) => {
    const home = homeIn('dunes', roles)
    if (home.endsWith('/week')) expect(scopeOf(roles, 'clinics:read')).not.toBeNull()
    if (home.endsWith('/today')) expect(scopeOf(roles, 'register:take')).not.toBeNull()
    if (home.endsWith('/money')) expect(scopeOf(roles, 'ledger:read')).not.toBeNull()
  })

  it('is the front page for somebody of no academy', () => {
    expect(homeOf({ memberships: [] })).toBe('/')
  })
})
