type Proj4 = typeof import('proj4')
let library: Proj4 | null = null

/** The projection library, loaded once and only when a CRS needs it. */
export async function loadProj4(): Promise<Proj4> {
  if (!library) {
    const module = (await import('proj4')) as unknown as { default?: Proj4 }
    library = module.default ?? (module as unknown as Proj4)
  }
  return library
}
/** The library if it has been loaded in this thread. */
export const heldProj4 = (): Proj4 | null => library
