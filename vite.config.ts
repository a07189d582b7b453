import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'
import { offlineClient } from './server/bootstrap/client-plugins.ts'

/**
 * Parts that every screen needs are named, so that a change in a screen leaves them in the browser's cache.
 * Charts and exports are only ever reached through lazy imports and get chunks of their own.
 */
const chunks = [
  { name: 'frame', test: /node_modules[\\/](react|react-dom|scheduler|react-router|react-router-dom|@tanstack)[\\/]/ },
  { name: 'schemas', test: /node_modules[\\/]zod[\\/]/ },
  { name: 'forms', test: /node_modules[\\/](react-hook-form|@hookform)[\\/]/ },
  { name: 'charts', test: /node_modules[\\/](recharts|d3-[a-z]+|victory-vendor|immer|reselect|@reduxjs)[\\/]/ },
]

export default defineConfig({
  plugins: [react(), tailwindcss(), offlineClient()],
  build: {
    outDir: 'dist',
    // A page that was loaded before an update still finds its parts: see former-builds.ts.
    emptyOutDir: false,
    rolldownOptions: { output: { codeSplitting: { groups: chunks } } },
  },
})
