import type { Day } from '../plant/day.ts';
import { type Component, inForce, type Machine } from '../plant/types.ts';

/** Rated speed in r/min: stated, else by the ratio to the driving component (the one before it, then before that); null unknown. */
export function ratedSpeedRpm(machine: Machine, component: Component, day: Day): number | null {
  let factor = 1;
  for (let i = machine.components.indexOf(component); i >= 0; i -= 1) {
    const row = inForce((machine.components[i] as Component).rows, day);
    if (row.speedRpm !== null) return row.speedRpm * factor;
    if (row.speedRatio === null) return null;
    factor *= row.speedRatio;
  }
  return null;
}
