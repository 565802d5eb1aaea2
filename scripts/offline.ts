import { createHash } from 'node:crypto'
import { readdir, readFile, writeFile } from 'node:fs/promises'
import { join, relative, sep } from 'node:path'
import type { Plugin } from 'vite'

const NAME = 'offline.js'

/**
 * Writes the service worker that lets the app open without a network: it keeps the build's own files, by the hash of all of them, and asks
 * nobody else for anything. Pages ask the network first, so that a fresh build is taken at once; files with a hash in their name never change.
 */
export function offline(): Plugin {
  let outDir = ''
  return {
    name: 'sightfell-offline',
    apply: 'build',
    configResolved(config) {
      // builds of the workers inside the page's build have no page of their own
      outDir = join(config.root, config.build.outDir)
      if (config.build.outDir.startsWith(sep)) outDir = config.build.outDir
    },
    async closeBundle() {
      const files = (await walk(outDir)).filter((f) => f !== NAME && !f.endsWith('.map')).sort()
      if (!files.includes('index.html')) return
      const hash = createHash('sha256')
      for (const f of files) hash.update(f).update(await readFile(join(outDir, f)))
      await writeFile(join(outDir, NAME), workerText(hash.digest('hex').slice(0, 16), files))
    },
  }
}

async function walk(dir: string, root = dir): Promise<string[]> {
  const entries = await readdir(dir, { withFileTypes: true })
  const lists = await Promise.all(
    entries.map(async (e) => (e.isDirectory() ? walk(join(dir, e.name), root) : [relative(root, join(dir, e.name)).split(sep).join('/')])),
  )
  return lists.flat()
}

const workerText = (version: string, files: readonly string[]): string => `const CACHE = 'sightfell-${version}'
const FILES = ${JSON.stringify(files.map((f) => (f === 'index.html' ? './' : f)))}
const own = (url) => url.origin === self.location.origin && url.href.startsWith(self.registration.scope)

self.addEventListener('install', (event) => {
  event.waitUntil(caches.open(CACHE).then((cache) => cache.addAll(FILES)))
})
self.addEventListener('activate', (event) => {
  const old = async () => {
    for (const name of await caches.keys()) if (name.startsWith('sightfell-') && name !== CACHE) await caches.delete(name)
    await self.clients.claim()
  }
  event.waitUntil(old())
})
self.addEventListener('fetch', (event) => {
  const { request } = event
  const url = new URL(request.url)
  if (request.method !== 'GET' || !own(url)) return
  const kept = async () => {
    const cache = await caches.open(CACHE)
    return request.mode === 'navigate' ? cache.match('./', { ignoreVary: true }) : cache.match(request, { ignoreSearch: true, ignoreVary: true })
  }
  const answer = async () => {
    if (url.pathname.includes('/assets/')) return (await kept()) ?? fetch(request)
    try {
      return await fetch(request)
    } catch (error) {
      const found = await kept()
      if (found) return found
      throw error
    }
  }
  event.respondWith(answer())
})
`
