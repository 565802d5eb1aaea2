/** The antenna as the kernels need it: every field settled, degrees and dB. Follows `radar.antenna` of the study file. */
export interface AntennaInput {
  readonly gainDbi: number
  readonly azimuthBeamwidthDeg: number
  readonly elevationBeamwidthDeg: number
  readonly elevationPattern: 'cosecant-squared' | 'gaussian' | 'table'
  readonly cosecantLimitDeg: number
  /** Rows of [elevation − tilt deg, dB relative to peak]; used when elevationPattern is 'table'. */
  readonly elevationTable: readonly (readonly [number, number])[]
  /** Azimuth side-lobe level, one way, dB relative to peak. */
  readonly sidelobeDb: number
  /** Floor of the elevation pattern, for clutter only, dB relative to peak. */
  readonly elevationSidelobeDb: number
  /** Elevation of the beam peak, negative down. */
  readonly tiltDeg: number
  /** This beam's peak over the tilt, for stacked beams; 0 when absent. */
  readonly offsetDeg?: number
  readonly apertureWidthM: number | null
  readonly apertureHeightM: number | null
}
