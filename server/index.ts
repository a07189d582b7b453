import path from 'node:path'
import { serveClient } from './client-files'
import { projectRoot } from './config'
import { loadDemoShop, signInLines } from './database/seeders/demo'
import type { DemoSignIn } from './database/seeders/demo'
import { serve } from './serve'

let signIns: DemoSignIn[] = []

await serve({
  pages: () => Promise.resolve({ add: serveClient(path.join(projectRoot, 'dist')) }),
  // An outside database gets the demo shop only when it is asked for: npm run demo.
  prepare: async (context, { isEmbedded }) => {
    if (isEmbedded) signIns = await loadDemoShop(context)
  },
  announce: ({ address, context }) => {
    process.stdout.write(`Quarterload is at ${context.config.publicUrl ?? address}\n${signInLines(signIns)}`)
  },
})
