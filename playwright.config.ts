import { defineConfig } from '@playwright/test'

const quiet = [
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-quic',
  '--no-first-run',
  '--disable-default-apps',
  '--font-render-hinting=none',
  '--force-color-profile=srgb',
]
const asRoot = process.getuid?.() === 0 ? ['--no-sandbox'] : []
const launch = (args: string[]) => ({
  executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
  args: [...quiet, ...asRoot, ...args],
})
// another build or another port, for two checkouts side by side
const port = process.env.E2E_PORT ?? '4173'
const dist = process.env.E2E_DIST
const url = `http://127.0.0.1:${port}`

const TIMED = /(demo|dragging|smooth)\.spec/

export default defineConfig({
  testDir: 'e2e',
  outputDir: 'test-results/e2e',
  workers: 2,
  timeout: 180_000,
  expect: { timeout: 20_000 },
  reporter: [['list'], ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ?? 'test-results/e2e.json' }]],
  use: {
    baseURL: url,
    serviceWorkers: 'block',
    viewport: { width: 1440, height: 900 },
    actionTimeout: 60_000,
    screenshot: 'only-on-failure',
  },
  webServer: {
    command: `npx vite preview --port ${port}${dist ? ` --outDir ${dist}` : ''}`,
    url,
    reuseExistingServer: !process.env.CI,
    timeout: 60_000,
  },
  projects: [
    { name: 'canvas', testIgnore: [/webgl/, TIMED], use: { launchOptions: launch(['--disable-3d-apis']) } },
    {
      name: 'webgl',
      testMatch: /webgl/,
      use: {
        viewport: { width: 1280, height: 800 },
        launchOptions: launch(['--use-angle=swiftshader', '--enable-unsafe-swiftshader', '--ignore-gpu-blocklist']),
      },
    },
    // what prints a time has the machine for itself
    {
      name: 'timed',
      testMatch: TIMED,
      workers: 1,
      dependencies: ['canvas', 'webgl'],
      use: { launchOptions: launch(['--disable-3d-apis']) },
    },
  ],
})
