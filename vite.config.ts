import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'

const api = process.env['API_URL'] ?? 'http://127.0.0.1:4600'

export default defineConfig(({ command }) => {
  // A build started by a test would otherwise carry React's development version.
  if (command === 'build') process.env['NODE_ENV'] = 'production'
  return {
    root: 'portal',
    plugins: [react(), tailwindcss()],
    // The server replaces the placeholder in each response.
    html: { cspNonce: '__CSP_NONCE__' },
    build: {
      // The page's policy allows no data: fonts.
      assetsInlineLimit: 0,
      outDir: '../dist/portal',
      emptyOutDir: true,
      manifest: true,
      chunkSizeWarningLimit: 1600,
    },
    server: { proxy: Object.fromEntries(['/v1', '/portal/v1', '/support/v1'].map((path) => [path, { target: api }])) },
  }
})
