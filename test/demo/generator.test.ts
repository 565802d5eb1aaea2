import { describe, expect, test } from 'vitest'
import { type ByteSource, openTerrain, readClasses } from '../../core/index.ts'
import { demoFiles } from '../../scripts/demo/demoFiles.ts'
import { demoFile } from './openDemo.ts'

const source = (name: string, bytes: Uint8Array): ByteSource => ({
  name,
  size: bytes.length,
  read: async (offset, length) => new Uint8Array(bytes.subarray(offset, offset + length)).buffer,
})
async function heights(bytes: Uint8Array) {
  const head = await openTerrain(source('terrain.tif', bytes), {})
  const samples = new Float32Array(head.shape.width * head.shape.height)
  await head.readInto({ shape: head.shape, samples })
  return { shape: head.shape, samples }
}

describe('npm run demo', () => {
  // Text byte for byte; rasters by their samples, as another Deflate may pack the same numbers differently.
  test('makes exactly the files that are served', async () => {
    const made = await demoFiles()
    for (const name of ['study.json', 'obstacles.geojson', 'roads.geojson'])
      expect(Buffer.from(made.get(name)!).toString('utf8'), name).toBe(demoFile(name).toString('utf8'))
    const [ours, served] = await Promise.all([made.get('terrain.tif')!, demoFile('terrain.tif')].map(heights))
    expect(ours.shape).toEqual(served.shape)
    expect(Buffer.from(ours.samples.buffer).equals(Buffer.from(served.samples.buffer))).toBe(true)
    const [cover, servedCover] = await Promise.all(
      [made.get('cover.tif')!, demoFile('cover.tif')].map(async (bytes) => {
        const head = await readClasses(source('cover.tif', bytes))
        return head.readClassesInto(ours.shape)
      }),
    )
    expect(cover.classes).toEqual(servedCover.classes)
    expect(Buffer.from(cover.codes).equals(Buffer.from(servedCover.codes))).toBe(true)
  }, 240_000)
})
