/** dB of an amplitude over a reference of the same unit: 20 lg. The reference is always printed with it. */
export const decibels = (amplitude: number, reference: number): number => 20 * Math.log10(amplitude / reference);

/** References of ISO 1683, in SI units, with the text that must stand beside a level. */
export const DB_REFERENCES = {
  velocity: { si: 1e-9, unit: 'm/s', text: 're 1 nm/s' },
  acceleration: { si: 1e-6, unit: 'm/s²', text: 're 1 µm/s²' },
} as const;
