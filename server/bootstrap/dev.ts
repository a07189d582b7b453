import { projectRoot } from '../config'
import { serve } from '../serve'

process.env['NODE_ENV'] ??= 'development'

await serve({
  pages: async (server) => {
    const { createServer: createVite } = await import('vite')
    const vite = await createVite({
      root: projectRoot,
      appType: 'spa',
      server: { middlewareMode: true, hmr: { server } },
    })
    return {
      add: (app) => {
        app.use(vite.middlewares)
      },
      close: () => vite.close(),
    }
  },
  announce: ({ address }) => {
    process.stdout.write(`Quarterload, for work on it, is at ${address}\n`)
  },
})
