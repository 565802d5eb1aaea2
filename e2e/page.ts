import { test as base, expect } from '@playwright/test'

/** Every test runs with a watch on its page: nothing may leave the machine, nothing may fail in the console. */
export const test = base.extend<{ expectedTrouble: RegExp[] }>({
  // biome-ignore lint/correctness/noEmptyPattern: the form Playwright asks for
  expectedTrouble: async ({}, use) => {
    await use([])
  },
  page: async ({ page, expectedTrouble }, use) => {
    const gone: string[] = []
    const trouble: string[] = []
    page.on('request', (request) => {
      const url = new URL(request.url())
      if (!['data:', 'blob:'].includes(url.protocol) && url.hostname !== '127.0.0.1') gone.push(request.url())
    })
    page.on('pageerror', (error) => trouble.push(error.stack ?? error.message))
    page.on('console', (message) => {
      if (message.type() === 'error') trouble.push(message.text())
    })
    await use(page)
    expect(gone, 'requests that left the machine').toEqual([])
    expect(
      trouble.filter((t) => !expectedTrouble.some((e) => e.test(t))),
      'errors of the page',
    ).toEqual([])
  },
})
export { expect } from '@playwright/test'
