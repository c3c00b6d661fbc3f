/**
 * Relations of a pure sine at one stated frequency: V = 2πf·D, A = 2πf·V, all of one detection, SI units. They hold for a
 * single frequency only; nothing here turns an overall into another quantity.
 */
const omega = (frequencyHz: number): number => 2 * Math.PI * frequencyHz;

/** m/s from m, of the same detection. */
export const velocityOfDisplacement = (displacementM: number, frequencyHz: number): number => displacementM * omega(frequencyHz);
/** m/s² from m/s, of the same detection. */
export const accelerationOfVelocity = (velocityMs: number, frequencyHz: number): number => velocityMs * omega(frequencyHz);
/** m from m/s, of the same detection. */
export const displacementOfVelocity = (velocityMs: number, frequencyHz: number): number => velocityMs / omega(frequencyHz);
/** m/s from m/s², of the same detection. */
export const velocityOfAcceleration = (accelerationMs2: number, frequencyHz: number): number => accelerationMs2 / omega(frequencyHz);

/** Frequency in Hz at which a sine would have both: f = v/(2πd) = a/(2πv), SI, one detection. */
export const apparentFrequencyHz = (derivative: number, quantity: number): number => derivative / (2 * Math.PI * quantity);
