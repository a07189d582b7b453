import path from 'node:path'
import { serveClient } from './client-files'
import { projectRoot } from './config'
import { serve } from './serve'

await serve({
  pages: () => Promise.resolve({ add: serveClient(path.join(projectRoot, 'dist')) }),
  announce: ({ address, context }) => {
    process.stdout.write(`Quarterload is at ${context.config.publicUrl ?? address}\n`)
  },
})
