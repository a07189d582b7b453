import './index.css'
import { QueryClientProvider } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { RouterProvider } from 'react-router-dom'
import { SkeletonPage } from './components/skeleton'
import { sessionEnded } from './features/people/api/get-session'
import { createQueryClient } from './lib/query-client'
import { newVersion } from './lib/new-version'
import { applyTheme, readTheme } from './lib/theme'
import { createRouter, findOutWhoIsHere } from './router'

applyTheme(readTheme())

const root = document.getElementById('root')
if (root === null) throw new Error('The page has no element to draw into.')

const client = createQueryClient(sessionEnded)
const page = createRoot(root)
page.render(<SkeletonPage />)
void findOutWhoIsHere(client).then(() => {
  page.render(
    <StrictMode>
      <QueryClientProvider client={client}>
        <RouterProvider router={createRouter(client)} />
      </QueryClientProvider>
    </StrictMode>,
  )
})

// Work on the program is not to be looked at through yesterday's copy of it.
void (import.meta.env.PROD ? newVersion.watch() : newVersion.unregister())
