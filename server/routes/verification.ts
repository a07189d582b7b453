import { Router } from 'express'
import type { AppContext } from '../context'
import { servedKeys } from '../services/verification'

/** What a seal is checked with, for whoever asks: nobody signs in to doubt a record. */
export function verificationRoutes(context: AppContext): Router {
  const router = Router()
  router.get('/verification/keys', (_request, response) => {
    response.json(servedKeys(context))
  })
  return router
}
