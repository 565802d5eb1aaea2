import { availableParallelism } from 'node:os'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'
import { offline } from './scripts/offline.ts'

const isolation = { 'Cross-Origin-Opener-Policy': 'same-origin', 'Cross-Origin-Embedder-Policy': 'require-corp' }

export default defineConfig({
  plugins: [react(), offline()],
  worker: { format: 'es' },
  build: { target: 'es2022', chunkSizeWarningLimit: 2000 },
  server: { headers: isolation },
  preview: { headers: isolation, port: 4173, strictPort: true, host: '127.0.0.1' },
  optimizeDeps: { include: ['geotiff', 'proj4', 'fast-png'] },
  test: {
    // the runner alone would leave one of two cores idle
    maxWorkers: Math.max(2, availableParallelism() - 1),
    projects: [
      {
        test: {
          name: 'unit',
          include: ['test/**/*.test.ts', 'test/**/*.test.tsx'],
          exclude: ['test/reference/**'],
          testTimeout: 60_000,
          environment: 'node',
        },
      },
      { test: { name: 'reference', include: ['test/reference/**/*.test.ts'], testTimeout: 120_000, environment: 'node' } },
    ],
  },
})
