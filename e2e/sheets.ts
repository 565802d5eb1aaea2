import { expect, type Page } from '@playwright/test'

/** What a sheet of the map shows: pixels that are painted at all, those in the warm and the cool hues, and a mark of the whole picture. */
export interface Ink {
  readonly painted: number
  readonly share: number
  readonly warm: number
  readonly cool: number
  /** Spread of the green channel: 0 for one flat colour. */
  readonly spread: number
  readonly mark: number
  /** Mean brightness 0–255. */
  readonly light: number
}

/** Pixels of the visible bitmap of a sheet. */
export function inkOf(page: Page, sheet: 'overlay' | 'base'): Promise<Ink> {
  return page.evaluate((name): Ink => {
    const none = { painted: 0, share: 0, warm: 0, cool: 0, spread: 0, mark: 0, light: 0 }
    const front = [...document.querySelectorAll<HTMLCanvasElement>(`.map-sheet.${name} canvas`)].find(
      (c) => c.style.visibility === 'visible' && c.width > 0,
    )
    if (!front) return none
    const pen = new OffscreenCanvas(front.width, front.height).getContext('2d')
    if (!pen) return none
    pen.drawImage(front, 0, 0)
    const { data } = pen.getImageData(0, 0, front.width, front.height)
    let [painted, warm, cool, sum, squares, mark] = [0, 0, 0, 0, 0, 0]
    for (let i = 0; i < data.length; i += 4) {
      if (data[i + 3]! < 8) continue
      painted++
      const warmth = data[i]! - data[i + 2]!
      if (warmth > 25) warm++
      else if (warmth < -20) cool++
      sum += data[i + 1]!
      squares += data[i + 1]! ** 2
      mark = (Math.imul(mark, 31) + data[i]! + 7 * data[i + 1]! + 13 * data[i + 2]! + i) | 0
    }
    if (painted === 0) return none
    const mean = sum / painted
    return {
      painted,
      share: (4 * painted) / data.length,
      warm,
      cool,
      spread: Math.sqrt(Math.max(0, squares / painted - mean ** 2)),
      mark,
      light: mean,
    }
  }, sheet)
}

/** Waits until a sheet shows something that is not one flat colour. */
export async function expectPainted(page: Page, sheet: 'overlay' | 'base'): Promise<Ink> {
  await expect.poll(async () => (await inkOf(page, sheet)).spread, { timeout: 60_000, message: `${sheet} painted` }).toBeGreaterThan(2)
  return inkOf(page, sheet)
}
/** Waits until a sheet shows another picture than this one. */
export async function expectRepainted(page: Page, sheet: 'overlay' | 'base', before: Ink): Promise<Ink> {
  let ink = before
  await expect
    .poll(async () => (ink = await inkOf(page, sheet)).mark, { timeout: 60_000, message: `${sheet} painted anew` })
    .not.toBe(before.mark)
  return ink
}
