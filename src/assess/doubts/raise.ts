import type { Context } from '../track.ts';
import { formalDoubts } from './formal.ts';
import { allDownDoubts, nearZeroDoubts, unexplainedFalls } from './low.ts';
import { identicalReadings, impossiblePairs, swappedMachines, swappedPoints } from './pairs.ts';
import { unitFactorDoubts } from './unit-factor.ts';

/** All doubts of one survey, in the order of the rules; a fall is looked at last, since another doubt explains it. */
export function raiseDoubts(context: Context, survey: number): void {
  unitFactorDoubts(context, survey);
  nearZeroDoubts(context, survey);
  allDownDoubts(context, survey);
  unexplainedFalls(context, survey);
  if (survey !== context.current) return;
  impossiblePairs(context, survey);
  swappedPoints(context, survey);
  swappedMachines(context, survey);
  identicalReadings(context, survey);
  formalDoubts(context);
}
