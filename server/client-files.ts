import path from 'node:path'
import express from 'express'
import type { Express } from 'express'
import { unknownEndpoint } from './middleware/problem-handler'

const forever = 365 * 24 * 3_600

/** The built client: named chunks are cached for good, the page that names them never without asking. */
export function serveClient(distDirectory: string): (app: Express) => void {
  const page = path.join(distDirectory, 'index.html')
  return (app) => {
    app.use('/assets', express.static(path.join(distDirectory, 'assets'), { immutable: true, maxAge: forever * 1000 }), unknownEndpoint)
    app.use(express.static(distDirectory, { index: false, setHeaders: (response) => response.set('Cache-Control', 'no-cache') }))
    app.use((request, response, next) => {
      const wantsPage = (request.method === 'GET' || request.method === 'HEAD') && request.accepts(['html', 'json']) === 'html'
      if (!wantsPage) return next()
      response.set('Cache-Control', 'no-cache').sendFile(page)
    })
  }
}
