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

export default defineConfig({
  testDir: 'e2e',
  outputDir: 'test-results/e2e',
  workers: 1,
  timeout: 120_000,
  reporter: [['list'], ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ?? 'test-results/e2e.json' }]],
  use: { baseURL: 'http://127.0.0.1:4173', viewport: { width: 1440, height: 900 } },
  webServer: { command: 'npx vite preview', url: 'http://127.0.0.1:4173', reuseExistingServer: !process.env.CI, timeout: 60_000 },
  projects: [
    { name: 'canvas', testIgnore: /webgl/, use: { launchOptions: launch(['--disable-3d-apis']) } },
    {
      name: 'webgl',
      testMatch: /webgl/,
      use: { launchOptions: launch(['--use-angle=swiftshader', '--enable-unsafe-swiftshader', '--ignore-gpu-blocklist']) },
    },
  ],
})
