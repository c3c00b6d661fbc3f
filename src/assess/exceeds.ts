/**
 * The one place where a value meets a boundary. In: two numbers of one unit and detection. Out: yes or no, with the
 * relative tolerance of the rules (in floating point 3.5 − 2.8 > 0.25 × 2.8). Never: a bare comparison elsewhere in assess/.
 */
const RELATIVE_TOLERANCE = 1e-9;

const slack = (a: number, b: number): number => RELATIVE_TOLERANCE * Math.max(Math.abs(a), Math.abs(b));

/** True when `value` lies above `boundary`; exactly on it (within the tolerance) it does not. */
export function exceeds(value: number, boundary: number): boolean {
  return value - boundary > slack(value, boundary);
}

/** True when `value` is at or above `boundary`, the tolerance counting as "at". */
export function reaches(value: number, boundary: number): boolean {
  return value - boundary >= -slack(value, boundary);
}

/**
 * True when the step from `from` to `to` is larger than `step`. The tolerance is that of the values themselves: their
 * difference carries their rounding, which can be far larger than a relative 1e-9 of a small difference.
 */
export function risesBy(to: number, from: number, step: number): boolean {
  return to - from - step > Math.max(slack(to, from), slack(step, step));
}
