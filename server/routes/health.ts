import { Router } from 'express'
import type { AppContext } from '../context'
import { Problem } from '../problem'

export function healthRoutes(context: AppContext): Router {
  const router = Router()
  router.get('/health', async (_request, response) => {
    try {
      await context.database.query('SELECT 1')
    } catch {
      throw new Problem(503, 'database-unavailable', 'The server is up, but its database does not answer.')
    }
    response.json({ status: 'up' })
  })
  return router
}
