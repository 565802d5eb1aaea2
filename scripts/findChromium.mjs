// Finds a Chromium for the browser tests: $CHROMIUM_PATH, the PATH, Playwright's own; with install: true, Debian's package as root.
import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'

const onPath = (name) => {
  const r = spawnSync('sh', ['-c', `command -v ${name}`], { encoding: 'utf8' })
  return r.status === 0 ? r.stdout.trim() : null
}
const lookAround = async () => {
  if (process.env.CHROMIUM_PATH && existsSync(process.env.CHROMIUM_PATH)) return process.env.CHROMIUM_PATH
  for (const name of ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable']) {
    const path = onPath(name)
    if (path) return path
  }
  const { chromium } = await import('@playwright/test')
  return existsSync(chromium.executablePath()) ? chromium.executablePath() : null
}
/** Path of a Chromium, or null when there is none and none could be installed. */
export async function findChromium({ install = false } = {}) {
  const found = await lookAround()
  if (found || !install) return found
  if (process.getuid?.() === 0 && onPath('apt-get')) {
    console.error("No Chromium found: installing Debian's package.")
    spawnSync('apt-get', ['update', '-qq'], { stdio: 'inherit' })
    spawnSync('apt-get', ['install', '-y', '-qq', 'chromium'], {
      stdio: 'inherit',
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    })
  } else spawnSync('npx', ['playwright', 'install', 'chromium'], { stdio: 'inherit' })
  return lookAround()
}
