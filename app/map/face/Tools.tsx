import { Button, Menu, MenuItem, MenuTrigger, Popover } from 'react-aria-components'
import { MAP_WORDS } from '../../words/index.ts'
import type { WebglKind } from '../sheets/webgl.ts'

export type FitTo = 'ground' | 'range' | 'candidates'
export interface ToolsProps {
  readonly onZoom: (factor: number) => void
  readonly onFit: (to: FitTo) => void
  readonly fits: readonly FitTo[]
  readonly base: 'canvas' | 'maplibre'
  /** What would draw the base with WebGL. */
  readonly gl: WebglKind
  readonly onBase: (base: 'canvas' | 'maplibre') => void
}
const FIT_WORDS: Record<FitTo, string> = {
  ground: MAP_WORDS.fitGround,
  range: MAP_WORDS.fitRange,
  candidates: MAP_WORDS.fitCandidates,
}
/** Zoom, fit and base: small, at the map's edge. */
export function Tools({ onZoom, onFit, fits, base, gl, onBase }: ToolsProps) {
  return (
    <div className="tools map-card">
      <Button className="tool" aria-label={MAP_WORDS.zoomIn} onPress={() => onZoom(2)}>
        +
      </Button>
      <Button className="tool" aria-label={MAP_WORDS.zoomOut} onPress={() => onZoom(0.5)}>
        −
      </Button>
      <MenuTrigger>
        <Button className="tool wide">{MAP_WORDS.fit}</Button>
        <Popover className="popover" placement="bottom end" offset={4}>
          <Menu className="options" aria-label={MAP_WORDS.fit} onAction={(key) => onFit(key as FitTo)}>
            {fits.map((f) => (
              <MenuItem key={f} id={f} className="option">
                {FIT_WORDS[f]}
              </MenuItem>
            ))}
          </Menu>
        </Popover>
      </MenuTrigger>
      <MenuTrigger>
        <Button className="tool wide">{MAP_WORDS.base}</Button>
        <Popover className="popover" placement="bottom end" offset={4}>
          <Menu
            className="options"
            aria-label={MAP_WORDS.base}
            selectionMode="single"
            disallowEmptySelection
            selectedKeys={[base]}
            disabledKeys={gl === 'none' ? ['maplibre'] : []}
            onAction={(key) => onBase(key as 'canvas' | 'maplibre')}
          >
            <MenuItem id="canvas" textValue={MAP_WORDS.baseCanvas} className="option">
              {MAP_WORDS.baseCanvas}
              <span className="hint">{MAP_WORDS.baseCanvasHint}</span>
            </MenuItem>
            <MenuItem id="maplibre" textValue={MAP_WORDS.baseGl} className="option">
              {MAP_WORDS.baseGl}
              <span className="hint">{MAP_WORDS.baseHints[gl]}</span>
            </MenuItem>
          </Menu>
        </Popover>
      </MenuTrigger>
    </div>
  )
}
