/** Small repeatable scatter: a number in −1…1 from a text, the same on every machine. */
export function noise(seed: string): number {
  let h = 2166136261;
  for (let i = 0; i < seed.length; i += 1) h = Math.imul(h ^ seed.charCodeAt(i), 16777619) >>> 0;
  for (let round = 0; round < 3; round += 1) h = (Math.imul(h ^ (h >>> 15), 2246822519) + 374761393) >>> 0;
  return (h / 4294967295) * 2 - 1;
}
