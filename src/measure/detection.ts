/** How an amplitude was detected from the signal. The words are the contract's. */
export const DETECTIONS = ['rms', 'calculated peak', 'true peak', 'calculated peak-to-peak', 'true peak-to-peak', 'mean'] as const;
export type Detection = (typeof DETECTIONS)[number];

/** Quantities whose units convert; a plant's own quantity is any other word and converts to nothing. */
export const KNOWN_QUANTITIES = ['velocity', 'displacement', 'acceleration'] as const;
export type KnownQuantity = (typeof KNOWN_QUANTITIES)[number];
