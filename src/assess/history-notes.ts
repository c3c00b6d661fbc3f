/**
 * What the history of one reading shows beside its level: a step, a spike that went, the class of speed or state it is
 * compared in. In: a look. Out: sentences. Never: a level raised or lowered by them.
 */
import { shownFacts } from '../measure/display.ts';
import { dayText } from '../plant/day.ts';
import type { Reading } from '../plant/types.ts';
import type { Trend } from '../record/types.ts';
import { say } from '../words/say.ts';
import { exceeds, reaches } from './exceeds.ts';
import { ratio, type Scale } from './rise.ts';
import { median } from './statistics/median.ts';
import { type Context, componentRow, isMeasured, type Look, pointRow, type Track } from './track.ts';

export function historyNotes(context: Context, track: Track, look: Look, trend: Trend | null): string[] {
  const { language } = context.plant.settings;
  const unit = track.series.unit;
  const notes: string[] = [];
  if (trend?.changed_on != null) notes.push(say(language, 'assess.note.step', { date: trend.changed_on, times: trend.changed_by ?? null }));
  const spike = spikeBefore(context, track, look);
  if (spike !== null)
    notes.push(
      say(
        language,
        'assess.note.was_high',
        shownFacts(context.plant.settings.units, { date: dayText(spike.day), value: spike.value, unit }),
      ),
    );
  const speeds = speedClass(context, track, look);
  if (speeds !== null) notes.push(say(language, 'assess.note.speed_class', speeds));
  return notes;
}

/** Readings looked back over for a spike, and how many must have come back since. */
const SPIKE_WITHIN = 4;
const BACK = 2;

/**
 * A single earlier reading that stood the step factor over the rest, with this one and at least one other since it back
 * at the rest's level; null where there is none. A spike is one reading: two in a row are a level.
 */
function spikeBefore(context: Context, track: Track, look: Look): (Reading & { value: number }) | null {
  // The first reading that was back stood doubted until this one.
  const among = new Set<Reading>([...look.comparable, look.reading]);
  const all = track.series.readings.filter(
    (r): r is Reading & { value: number } => isMeasured(r) && (among.has(r) || track.lifted[r.survey] === look.survey + 1),
  );
  const { scale } = pointRow(track, look.reading.day);
  if (scale === 'none' || all.length < SPIKE_WITHIN + BACK) return null;
  for (let i = all.length - 1 - BACK; i >= all.length - 1 - SPIKE_WITHIN; i -= 1) {
    const high = all[i] as Reading & { value: number };
    if (isSpike(all, i, scale, context.policy['5.step.factor'])) return high;
  }
  return null;
}

function isSpike(all: readonly { readonly value: number }[], at: number, scale: Scale, factor: number): boolean {
  const rest = median(all.filter((_, i) => i !== at).map((r) => r.value));
  const stands = (i: number): boolean => reaches(ratio((all[i] as { value: number }).value, rest, scale), factor);
  return stands(at) && all.slice(at + 1).every((_, k) => !stands(at + 1 + k)) && (at === 0 || !stands(at - 1));
}

/** The speeds among which a reading of a variable-speed drive, or a state, is compared; null where every reading compares. */
function speedClass(context: Context, track: Track, look: Look): { from: number; to: number; n: number; of: number; state: string } | null {
  const rpm = look.reading.speedRpm;
  const before = track.series.readings.filter((r) => r.survey < look.survey && isMeasured(r)).length;
  if (rpm === null || componentRow(track, look.reading.day).drive !== 'variable' || !exceeds(before, look.comparable.length)) return null;
  const share = context.policy['3.speed.overall'];
  return {
    from: Math.round(rpm * (1 - share)),
    to: Math.round(rpm * (1 + share)),
    n: look.comparable.length,
    of: before,
    state: look.reading.state === null ? '' : `, ${look.reading.state}`,
  };
}
