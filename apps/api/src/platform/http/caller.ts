import type { Role } from '@marram/contract'
import type { Request } from 'express'
import type { Services } from '../services'
import { findCaller } from '../tenancy/look-ups'
import type { SignedInAccount } from './context'

/** Who calls. Of a visitor nothing is known, and no academy is looked up for them here. */
export interface Caller {
  account: SignedInAccount | null
  academyId: string | null
  roles: readonly Role[]
}

const VISITOR: Caller = { account: null, academyId: null, roles: [] }

/** The person of this request, and their roles in the academy of this address. */
export async function readCaller(
  { db }: Services,
  request: Request,
  slug: string | null,
): Promise<Caller> {
  const { accountId, sessionVersion } = request.session
  if (!accountId) return VISITOR
  const row = await findCaller(db, { accountId, slug })
  // A sign-in of an older version counts as ended.
  if (!row || row.sessionVersion !== sessionVersion) return VISITOR
  const { academyId, roles, sessionVersion: _, ...account } = row
  return { account, academyId, roles }
}
