/**
 * Forcing frequencies (textbook formulas, common practice). In: geometry, counts, speeds. Out: multiples of the speed of the
 * inner ring, or Hz. Never: a verdict.
 */
export interface RollingBearing {
  /** Number of rolling elements. */
  readonly elements: number;
  /** Element and pitch diameter in one unit. */
  readonly elementDiameter: number;
  readonly pitchDiameter: number;
  readonly contactAngleDeg: number;
}

/** BPFO, BPFI, FTF and BSF (once per element turn) as multiples of the inner ring's speed; the outer ring stands still. */
export function bearingOrders(bearing: RollingBearing): {
  readonly bpfo: number;
  readonly bpfi: number;
  readonly ftf: number;
  readonly bsf: number;
} {
  const r = (bearing.elementDiameter / bearing.pitchDiameter) * Math.cos((bearing.contactAngleDeg * Math.PI) / 180);
  return {
    bpfo: (bearing.elements / 2) * (1 - r),
    bpfi: (bearing.elements / 2) * (1 + r),
    ftf: (1 - r) / 2,
    bsf: (bearing.pitchDiameter / (2 * bearing.elementDiameter)) * (1 - r * r),
  };
}

/** Gear mesh in Hz: teeth times the speed of the shaft that carries them. */
export const gearMeshHz = (teeth: number, shaftHz: number): number => teeth * shaftHz;
/** Vane or blade pass in Hz. */
export const bladePassHz = (blades: number, shaftHz: number): number => blades * shaftHz;
/** Twice the line frequency in Hz: 100 or 120. */
export const twiceLineHz = (lineHz: 50 | 60): number => 2 * lineHz;
