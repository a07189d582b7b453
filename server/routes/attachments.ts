import { raw, Router } from 'express'
import type { Request, Response } from 'express'
import { attachmentQuerySchema } from '#shared/api/attachments'
import { LARGEST_ATTACHMENT } from '#shared/ledger/envelope'
import type { AppContext } from '../context'
import { authenticate, personOf } from '../middleware/authenticate'
import { idParam, parseQuery } from '../middleware/validate'
import { notFound, Problem } from '../problem'
import { expectFile, keepFile, listFiles, readFile, type Expected, type NamedBy, type Served } from '../services/attachments'
import type { Asking } from '../services/ledgers'

const endings = { 'image/jpeg': 'jpg', 'image/png': 'png', 'image/webp': 'webp', 'application/pdf': 'pdf' } as const

function hashOf(request: Request): string {
  const hash = request.params['sha256']
  if (typeof hash !== 'string' || !/^[0-9a-f]{64}$/.test(hash)) throw notFound('This file')
  return hash
}

function namedBy(request: Request): NamedBy {
  const { ledger, calibration } = parseQuery(request, attachmentQuerySchema)
  if (ledger !== undefined) return { ledger }
  if (calibration !== undefined) return { calibration }
  throw notFound('This file')
}

/** `inline; filename*=…` as RFC 6266 and RFC 8187 write it, whatever the name is made of. */
function disposition({ file }: Served): string {
  const stem = (file.name ?? file.sha256.slice(0, 12)).replace(/\.(jpe?g|png|webp|pdf)$/i, '')
  const name = `${stem.replace(/[\p{Cc}\p{Cf}\p{Cs}/\\]/gu, '_')}.${endings[file.type]}`
  const encoded = encodeURIComponent(name).replace(/['()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`)
  return `inline; filename*=UTF-8''${encoded}`
}

function serve(response: Response, served: Served): void {
  response
    .set({
      'Content-Type': served.file.type,
      'X-Content-Type-Options': 'nosniff',
      'Content-Disposition': disposition(served),
      // Chromium shows documents under it too; a page of script, if one ever got in, could do nothing.
      'Content-Security-Policy': "sandbox; default-src 'none'",
      // Named by the hash of its bytes: it never changes.
      'Cache-Control': 'private, max-age=31536000, immutable',
    })
    .send(served.bytes)
}

/** Bytes of photos and documents: in after the entry that names them, out to whoever may read that entry. */
export function attachmentRoutes(context: AppContext): Router {
  const router = Router()
  const asking = (request: Request): Asking => ({ context, userId: personOf(request).userId })
  const expected = new WeakMap<Request, Expected>()
  router.use('/attachments', authenticate(context))

  router.put(
    '/attachments/:sha256',
    // Who may not send it, or sends it too early, is told before its bytes are read.
    async (request, _response, next) => {
      const type = (request.get('content-type') ?? '').split(';', 1)[0]?.trim().toLowerCase() ?? ''
      expected.set(request, await expectFile(asking(request), namedBy(request), hashOf(request), type))
      next()
    },
    raw({ type: () => true, limit: LARGEST_ATTACHMENT, inflate: false }),
    async (request, response) => {
      const file = expected.get(request)
      const body: unknown = request.body
      if (file === undefined || !Buffer.isBuffer(body)) throw new Problem(422, 'wrong-bytes', 'No bytes were sent. Send the file itself.')
      await keepFile(asking(request), file, body)
      response.status(204).end()
    },
  )

  router.get('/attachments/:sha256', async (request, response) => {
    const { size } = parseQuery(request, attachmentQuerySchema)
    serve(response, await readFile(asking(request), namedBy(request), hashOf(request), size))
  })

  router.get('/proof-tests/:id/attachments', authenticate(context), async (request, response) => {
    response.json({ attachments: await listFiles(asking(request), 'proof-test', idParam(request, 'id')) })
  })

  router.get('/presses/:id/attachments', authenticate(context), async (request, response) => {
    response.json({ attachments: await listFiles(asking(request), 'press', idParam(request, 'id')) })
  })

  return router
}
