/** Just enough of a document for a sheet of canvases: elements with style, classes and children. */
export class FakeElement {
  readonly style: Record<string, string> = {}
  readonly classes = new Set<string>()
  readonly children: FakeElement[] = []
  width = 0
  height = 0
  className = ''
  fades = 0
  readonly classList = {
    add: (name: string) => this.classes.add(name),
    remove: (name: string) => this.classes.delete(name),
  }
  append(child: FakeElement) {
    this.children.push(child)
  }
  remove() {}
  getContext() {
    return { transferFromImageBitmap: () => {} }
  }
  animate() {
    this.fades++
    return { onfinish: null }
  }
  /** The canvas that is seen. */
  get seen(): FakeElement | undefined {
    return this.children.find((c) => c.style.visibility === 'visible')
  }
}
/** Puts a document in place; returns the removal. */
export function fakeDocument(): () => void {
  const before = Object.getOwnPropertyDescriptor(globalThis, 'document')
  Object.defineProperty(globalThis, 'document', { configurable: true, value: { createElement: () => new FakeElement() } })
  return () => {
    if (before) Object.defineProperty(globalThis, 'document', before)
    else Reflect.deleteProperty(globalThis, 'document')
  }
}
