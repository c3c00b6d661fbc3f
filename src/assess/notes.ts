import { shownFacts } from '../measure/display.ts';
import type { Trend } from '../record/types.ts';
import { say } from '../words/say.ts';
import { alarmTrip } from './alarm.ts';
import { bandOf, speedTakenAsFixed } from './comparable.ts';
import { historyNotes } from './history-notes.ts';
import { exceeds } from './exceeds.ts';
import type { LimitsInForce } from './limits-in-force.ts';
import { type Context, type Look, pointRow, type Track } from './track.ts';
import { bandFit, neededLowHz } from './zone.ts';

/** What the assessment remarks about one reading without doubting it, in sentences. */
export function notesOf(context: Context, track: Track, look: Look | null, limits: LimitsInForce, trend: Trend | null): string[] {
  const { policy, plant } = context;
  const notes: string[] = [];
  const add = (key: string, facts = {}): void => {
    notes.push(say(plant.settings.language, `assess.note.${key}`, shownFacts(plant.settings.units, facts)));
  };
  if (look === null) return notes;
  if (look.zone !== null && limits.set !== null) {
    const rpm = look.reading.speedRpm ?? limits.ratedRpm;
    const lowHz = neededLowHz(limits, rpm, { speedRpm: policy['1.slow.speed'], lowHz: policy['1.slow.low'] });
    const fit = bandFit(bandOf(track, look.reading), { lowHz, highHz: limits.set.highHz });
    if (fit === 'wider') add('at_most');
    if (fit === 'unknown') add('band_unknown');
  }
  if (look.zone !== null && limits.byOurChoice) add('axial');
  if (alarmTrip(limits, look.baseline, policy).baselineAboveCap) add('baseline_above_cap');
  if (look.baseline?.provisional === true) add('baseline_provisional');
  if (
    look.previous !== null &&
    look.previous.speedRpm === null &&
    look.reading.speedRpm !== null &&
    speedTakenAsFixed(track, look.previous, look.reading)
  )
    add('speed_taken_as_fixed');
  notes.push(...historyNotes(context, track, look, trend));
  const background = backgroundOf(track, look);
  if (background !== null && exceeds(background, policy['2.background.share'] * look.value))
    add('background', { background, unit: track.series.unit });
  if (pointRow(track, look.reading.day).measuredOn === null && track.series.quantity === 'displacement') add('place_unknown');
  return notes;
}

/** The last value read at this point while the machine stood still, or null. */
function backgroundOf(track: Track, look: Look): number | null {
  for (let s = look.survey; s >= 0; s -= 1) {
    const reading = track.readings[s] ?? null;
    if (reading?.status === 'stopped' && reading.value !== null && reading.bound === null) return reading.value;
  }
  return null;
}
