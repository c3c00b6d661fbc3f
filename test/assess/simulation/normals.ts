/** Random numbers from a seed (mulberry32 with Box–Muller, both from memory), so that every figure can be made again. */
export interface Chance {
  /** Even between 0 and 1, neither of them. */
  uniform(): number;
  /** Standard normal. */
  normal(): number;
}

export function chance(seed: number): Chance {
  let state = seed >>> 0;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return (((t ^ (t >>> 14)) >>> 0) + 0.5) / 4294967296;
  };
  return { uniform, normal: () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform()) };
}

/** Standard deviation of the logarithm of a reading about its level. */
export const SCATTER = 0.1;
/** B/C of ISO 20816-3 group 2 rigid, which every simulated machine is judged by, mm/s rms. */
export const BC = 2.8;
/** As an instrument shows it: two decimals. */
export const shown = (value: number): number => Math.round(value * 100) / 100;
