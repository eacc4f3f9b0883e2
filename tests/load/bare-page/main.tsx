import { QueryClient, QueryClientProvider, useSuspenseQuery } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import {
  Link,
  Outlet,
  RouterProvider,
  ScrollRestoration,
  createBrowserRouter,
  isRouteErrorResponse,
  redirect,
  useParams,
  useRouteError,
  type LoaderFunctionArgs,
} from 'react-router'

/**
 * The libraries of the web app alone, used as the public page uses them: a data router with a
 * loader, a query behind it, links and an error page. The floor of what a first visit can weigh.
 */
const client = new QueryClient()

const pageQuery = (slug: string) => ({
  queryKey: ['page', slug],
  queryFn: async (): Promise<string> => (await fetch(`/${slug}.json`)).text(),
})

function Root() {
  return (
    <>
      <Outlet />
      <ScrollRestoration />
    </>
  )
}

function Page() {
  const { academy = '' } = useParams()
  const { data } = useSuspenseQuery(pageQuery(academy))
  return <Link to="/">{data}</Link>
}

function PageError() {
  const error = useRouteError()
  return <p>{isRouteErrorResponse(error) ? error.status : String(error)}</p>
}

const router = createBrowserRouter([
  {
    Component: Root,
    ErrorBoundary: PageError,
    children: [
      { path: '/', loader: () => redirect('/links') },
      {
        path: ':academy',
        Component: Page,
        loader: ({ params }: LoaderFunctionArgs) =>
          client.query({ ...pageQuery(params['academy'] ?? ''), staleTime: 'static' }),
      },
    ],
  },
])

const root = document.getElementById('root')
if (!root) throw new Error('the page has a root')

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  </StrictMode>,
)
