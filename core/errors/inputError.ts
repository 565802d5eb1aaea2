/** What went wrong with something the user gave. Becomes one sentence: file, place, what was found, what to do. */
export interface Complaint {
  /** Stable short code, e.g. 'not-a-tiff'. */
  readonly code: string
  /** Name of the file, without folders. */
  readonly file?: string
  /** Key path, line and column, row, or pixel. */
  readonly place?: string
  /** What was found, as a clause: "mast height is -5 m". */
  readonly found: string
  /** What to do, as an imperative clause: "give a height above 0 m". */
  readonly remedy: string
}

/** Bad input: exit 2 in the batch command, a notice in the app. `message` is one sentence of at most 240 characters. */
export class InputError extends Error {
  readonly code: string
  readonly file: string | undefined
  readonly place: string | undefined
  readonly remedy: string
  readonly found: string
  constructor(complaint: Complaint) {
    super(sentence(complaint))
    this.name = 'InputError'
    this.code = complaint.code
    this.file = complaint.file
    this.place = complaint.place
    this.found = complaint.found
    this.remedy = complaint.remedy
  }
}

const LONGEST = 240

/** `dem.tif, terrain[0].file: not a TIFF (starts with "<htm"); give a GeoTIFF file.` */
export function sentence(c: Complaint): string {
  const where = [c.file, c.place].filter(Boolean).join(', ')
  const end = `; ${c.remedy}.`
  const head = (where ? `${where}: ` : '') + c.found
  const text = head.replace(/\s+/g, ' ')
  return text.length + end.length <= LONGEST
    ? text + end
    : `${text.slice(0, Math.max(0, LONGEST - end.length - 1))}…${end}`.slice(0, LONGEST)
}
export const isInputError = (e: unknown): e is InputError => e instanceof Error && e.name === 'InputError'
