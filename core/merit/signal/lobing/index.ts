export { fillLobes, lobeGrid } from './cells.ts'
export { type LobeModel, lobeModel } from './model.ts'
export { type Lobe, type LobePlace, lobeAt } from './place.ts'
