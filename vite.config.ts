import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'

const api = `http://127.0.0.1:${process.env['MARRAM_API_PORT'] ?? '4310'}`

export default defineConfig({
  plugins: [react(), tailwindcss()],
  html: { cspNonce: '__CSP_NONCE__' },
  build: {
    outDir: 'dist/web',
    manifest: true,
    target: 'es2022',
    cssCodeSplit: false,
    // Fonts come from our own address only: the pages' policy allows no data: addresses for them.
    assetsInlineLimit: 0,
  },
  server: { proxy: { '/api': api, '/auth': api, '/webhooks': api } },
})
