import { QueryClientProvider } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { RouterProvider } from 'react-router'
import { queryClient } from './api/query-client'
import { makeRouter } from './routes'
import { ToastRegion } from './ui/toast'
import './styles/index.css'

const root = document.getElementById('root')
if (!root) throw new Error('index.html has a root')

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={makeRouter(queryClient)} />
      <ToastRegion />
    </QueryClientProvider>
  </StrictMode>,
)
