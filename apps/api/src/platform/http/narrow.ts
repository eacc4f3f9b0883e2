import { invariant } from '../invariant'
import type { AcademyContext, PersonContext, RequestContext, StaffContext } from './context'

/** The context of a route that needs sign-in. The router has checked it; this tells the compiler. */
export function asPerson(context: RequestContext): PersonContext {
  invariant(context.account, 'this route needs a signed-in person')
  return context as PersonContext
}

/** The context of a route under an academy's address. */
export function asAcademy(context: RequestContext): AcademyContext {
  invariant(context.academyId && context.academySlug, 'this route is inside an academy')
  return context as AcademyContext
}

export function asStaff(context: RequestContext): StaffContext {
  asPerson(context)
  asAcademy(context)
  return context as StaffContext
}
