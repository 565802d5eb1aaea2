import type { NeedDoc, StudyDoc } from '../../core/index.ts'
import { filesOf, freeNeedId } from '../document/index.ts'
import type { FileRole } from './types.ts'

/** The study with a file in a role; the same object when the study names the file already. */
export function addToStudy(doc: StudyDoc, file: string, role: FileRole): StudyDoc {
  if (filesOf(doc).includes(file)) return doc
  switch (role) {
    case 'terrain':
      return { ...doc, terrain: [...doc.terrain, { file }] }
    case 'landCover':
      return { ...doc, landCover: { file, legend: doc.landCover?.legend ?? legendOf(file) } }
    case 'obstacles':
      return { ...doc, obstacles: { file } }
    case 'roads':
      return { ...doc, roads: { file } }
    case 'facades':
      return { ...doc, facades: { file } }
    case 'landTable':
      return { ...doc, tables: { ...doc.tables, lowAngleLand: file } }
    case 'fixes':
    case 'track':
    case 'polygon':
      return { ...doc, needs: [...(doc.needs ?? []), needFromFile(doc, file, role)] }
    default:
      return doc
  }
}

function needFromFile(doc: StudyDoc, file: string, kind: 'fixes' | 'track' | 'polygon'): NeedDoc {
  const id = freeNeedId(doc.needs ?? [])
  const name = file.replace(/^.*\//, '').replace(/\.[^.]+$/, '')
  return { id, name, must: true, kind, file, ...(kind === 'polygon' ? { heightM: 300, heightAbove: 'sea' } : {}) }
}

/** Takes a file out of every place of the study that names it. */
export function takeOut(doc: StudyDoc, file: string): StudyDoc {
  const { landCover, obstacles, roads, facades, tables, ...rest } = doc
  return {
    ...rest,
    terrain: doc.terrain.filter((t) => t.file !== file),
    ...(doc.needs ? { needs: doc.needs.filter((n) => n.file !== file) } : {}),
    ...(landCover && landCover.file !== file ? { landCover } : {}),
    ...(obstacles && obstacles.file !== file ? { obstacles } : {}),
    ...(roads && roads.file !== file ? { roads } : {}),
    ...(facades && facades.file !== file ? { facades } : {}),
    ...(tables && tables.lowAngleLand !== file ? { tables } : {}),
  }
}

const legendOf = (file: string): 'worldcover' | 'nlcd' | 'corine' =>
  /nlcd/i.test(file) ? 'nlcd' : /corine|clc|u20\d\d/i.test(file) ? 'corine' : 'worldcover'
