/**
 * Doubts stand beside the verdict and correct nothing. In: the looks of one survey. Out: doubts added to them.
 * Never: a changed value.
 */
import { shownFacts } from '../../measure/display.ts';
import type { PlantSettings } from '../../plant/types.ts';
import type { Doubt, DoubtKind, Facts } from '../../record/types.ts';
import { say } from '../../words/say.ts';
import { median } from '../statistics/median.ts';
import type { Look } from '../track.ts';

/** A doubt with its sentence `assess.doubt.<kind>` in the plant's language and display units. */
export function doubt(settings: PlantSettings, kind: DoubtKind, effect: Doubt['effect'], facts: Facts, variant = ''): Doubt {
  return { kind, effect, facts, message: say(settings.language, `assess.doubt.${kind}${variant}`, shownFacts(settings.units, facts)) };
}

/** What "last time" means for doubts: the median of the point's earlier comparable readings where there are three, else the last. */
export function lastTime(look: Look): number | null {
  if (look.lastTime === undefined) look.lastTime = lastTimeOf(look);
  return look.lastTime;
}

function lastTimeOf(look: Look): number | null {
  const { comparable, previous } = look;
  if (previous === null) return null;
  return comparable.length >= 3 ? median(comparable.map((r) => r.value as number)) : previous.value;
}
