import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'

const api = process.env.FELLOE_API ?? 'http://127.0.0.1:4300'

export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: 'src/public',
  build: {
    outDir: 'dist/client',
    // Fonts must stay files: a data: URL would be refused by the font-src of our content security policy.
    assetsInlineLimit: 0,
    sourcemap: false,
  },
  server: { proxy: { '/api': api } },
})
