import type { QueryClient } from '@tanstack/react-query'
import { createBrowserRouter, type LoaderFunctionArgs, type RouteObject } from 'react-router'
import { deskHome } from './accounts/desk-home'
import { PageError, RootLayout } from './layouts/root.layout'

interface PageModule {
  default: React.ComponentType
  loader?: (client: QueryClient) => (args: LoaderFunctionArgs) => unknown
}

/** A page that is loaded when it is first visited, with its data asked for at the same time. */
function page(client: QueryClient, load: () => Promise<PageModule>): Pick<RouteObject, 'lazy'> {
  return {
    lazy: async () => {
      const { default: Component, loader } = await load()
      return { Component, ...(loader ? { loader: loader(client) } : {}) }
    },
  }
}

/** Every page of the web app, by its address. */
export function makeRouter(client: QueryClient) {
  const at = (path: string, load: () => Promise<PageModule>): RouteObject => ({
    path,
    ...page(client, load),
  })
  return createBrowserRouter([
    {
      Component: RootLayout,
      ErrorBoundary: PageError,
      HydrateFallback: () => null,
      children: [
        { index: true, ...page(client, () => import('./academies/front.page')) },
        at('sign-in', () => import('./accounts/sign-in.page')),
        at('reset', () => import('./accounts/reset.page')),
        at('verify', () => import('./accounts/verify.page')),
        at('invitation', () => import('./accounts/invitation.page')),
        at('open', () => import('./academies/open.page')),
        at('ui', () => import('./gallery/gallery.page')),
        at(':academy', () => import('./clinics/academy.page')),
        at(':academy/clinics/:clinic', () => import('./clinics/clinic.page')),
        {
          ...page(client, () => import('./layouts/golfer.layout')),
          children: [
            at(':academy/my', () => import('./enrolments/my.page')),
            at(':academy/my/places', () => import('./enrolments/places.page')),
            at(':academy/my/places/:enrolmentId', () => import('./checkout/place.page')),
            at(':academy/my/family', () => import('./golfers/family.page')),
          ],
        },
        {
          ...page(client, () => import('./layouts/staff.layout')),
          children: [
            { path: ':academy/desk', loader: deskHome(client) },
            at(':academy/desk/week', () => import('./clinics/week.page')),
            at(':academy/desk/today', () => import('./register/today.page')),
            at(':academy/desk/clinics', () => import('./clinics/clinics.page')),
            at(':academy/desk/clinics/new', () => import('./clinics/editor.page')),
            at(':academy/desk/clinics/:clinicId', () => import('./register/card.page')),
            at(':academy/desk/clinics/:clinicId/change', () => import('./clinics/editor.page')),
            at(':academy/desk/golfers', () => import('./golfers/golfers.page')),
            at(':academy/desk/golfers/:golferId', () => import('./golfers/golfer.page')),
            at(':academy/desk/money', () => import('./ledger/money.page')),
            at(':academy/desk/set-up', () => import('./academies/set-up.page')),
          ],
        },
      ],
    },
  ])
}
