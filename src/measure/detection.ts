/** How an amplitude was detected from the signal. The words are the contract's. */
export const DETECTIONS = ['rms', 'calculated peak', 'true peak', 'calculated peak-to-peak', 'true peak-to-peak', 'mean'] as const;
export type Detection = (typeof DETECTIONS)[number];

/** Quantities whose units convert; a plant's own quantity is any other word and converts to nothing. */
export const KNOWN_QUANTITIES = ['velocity', 'displacement', 'acceleration'] as const;
export type KnownQuantity = (typeof KNOWN_QUANTITIES)[number];

export const isKnownQuantity = (quantity: string): quantity is KnownQuantity => (KNOWN_QUANTITIES as readonly string[]).includes(quantity);

const PEAK = /^(pk|peak|0-p|0-pk|0-peak|zero-to-peak|zero-peak)$/;
const PEAK_TO_PEAK = /^(pk-pk|p-p|pp|pk-to-pk|peak-to-peak|peak-peak|peaktopeak|p2p|pkpk)$/;

/**
 * A detection from what was typed. `peak` and `peak-to-peak` without "calculated" or "true" mean what the plant says they
 * mean; where it says nothing they are ambiguous, and the one who asks must ask back. null: no detection at all.
 */
export function parseDetection(
  text: string,
  peakMeans: 'calculated' | 'true' | null,
): { readonly detection: Detection } | { readonly ambiguous: 'peak' | 'peak-to-peak' } | null {
  const typed = text.normalize('NFC').trim().toLowerCase().replace(/\s+/g, ' ');
  if (/^(rms|r\.m\.s\.?|true rms|effective|eff\.?)$/.test(typed)) return { detection: 'rms' };
  if (/^(mean|average|avg)$/.test(typed)) return { detection: 'mean' };
  const stated = /^(calculated|calc\.?|derived|true)[ -](.*)$/.exec(typed);
  const form = (stated?.[2] ?? typed).replaceAll(' ', '-');
  const shape = PEAK.test(form) ? ('peak' as const) : PEAK_TO_PEAK.test(form) ? ('peak-to-peak' as const) : null;
  if (shape === null) return null;
  const means = stated === null ? peakMeans : stated[1] === 'true' ? 'true' : 'calculated';
  return means === null ? { ambiguous: shape } : { detection: `${means} ${shape}` };
}
