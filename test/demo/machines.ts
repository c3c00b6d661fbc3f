import { POWER_HOUSE } from './power-house.ts';
import { PROCESS } from './process.ts';
import type { DemoMachine } from './types.ts';
import { ANNEX, YARD } from './yard.ts';

/** Machines of the round of the contractor. */
export const ROUND: readonly DemoMachine[] = [...POWER_HOUSE, ...PROCESS, ...YARD];
/** Every machine of Marrow Fen Sugar Works. */
export const MACHINES: readonly DemoMachine[] = [...ROUND, ...ANNEX];
export { ANNEX };
