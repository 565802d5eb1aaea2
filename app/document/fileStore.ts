import { createStore } from 'zustand/vanilla'

/** A file the user gave, as the page holds it: a handle on its bytes, not the bytes. */
export interface GivenFile {
  readonly name: string
  readonly blob: Blob
}
export interface FileState {
  /** By name as the study writes it. */
  readonly files: ReadonlyMap<string, GivenFile>
  give(files: readonly GivenFile[]): void
  /** Another study: only these stay. */
  replace(files: readonly GivenFile[]): void
}
/** The files of the study. Taking a file out of the study leaves it here, so that undo finds it. */
export const createFileStore = () =>
  createStore<FileState>()((set, get) => ({
    files: new Map(),
    give: (files) => set({ files: new Map([...get().files, ...files.map((f) => [f.name, f] as const)]) }),
    replace: (files) => set({ files: new Map(files.map((f) => [f.name, f])) }),
  }))
export type FileStore = ReturnType<typeof createFileStore>
