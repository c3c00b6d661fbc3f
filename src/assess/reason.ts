/**
 * Reasons in words. In: a verdict. Out: one sentence and the facts it was made from. Never: a diagnosis.
 */
import { shownFacts } from '../measure/display.ts';
import { dayText } from '../plant/day.ts';
import type { Facts } from '../record/types.ts';
import { say } from '../words/say.ts';
import { closingBetween } from './closing.ts';
import type { Verdict } from './level.ts';
import { ratio } from './rise.ts';
import { type Context, doubtedHigh, type Look, pointRow, type Track } from './track.ts';
import type { Movement } from './travel.ts';

export interface Reason {
  readonly reason: string;
  readonly facts: Facts;
}

export const unitWords = (track: Track): string =>
  track.series.detection === null ? track.series.unit : `${track.series.unit} ${track.series.detection}`;

/** The point with the component where there is more than one. */
export const pointWords = (track: Track): string =>
  track.component.implicit ? track.series.point : `${track.component.id} ${track.series.point}`;

/** Facts of a look that sentences may name; every number in the unit and detection of the series. */
export function factsOf(context: Context, track: Track, look: Look, movement: Movement): Facts {
  const row = pointRow(track, look.reading.day);
  const { previous, baseline, limits } = look;
  const before = previous?.value ?? null;
  const closing = previous === null ? null : closingBetween(context, track, previous.day, look.reading.day);
  return {
    point: pointWords(track),
    quantity: track.series.quantity,
    value: look.value,
    unit: unitWords(track),
    condition: look.zone ?? look.ratioClass ?? 'not assessed',
    travel: movement.travel,
    by: movement.by,
    previous: before,
    previous_date: previous === null ? null : dayText(previous.day),
    rise: before === null ? null : look.value - before,
    times: before === null || row.scale === 'none' ? null : finite(ratio(look.value, before, row.scale)),
    baseline: baseline?.value ?? null,
    rise_baseline: baseline === null ? null : look.value - baseline.value,
    times_baseline: baseline === null || row.scale === 'none' ? null : finite(ratio(look.value, baseline.value, row.scale)),
    ab: limits.ab,
    bc: limits.bc,
    cd: limits.cd,
    q: limits.q,
    vector: movement.vector?.amplitude ?? null,
    db_per_year: movement.trend?.db_per_year ?? null,
    readings: movement.trend?.n ?? null,
    changed_on: movement.trend?.changed_on ?? null,
    changed_by: movement.trend?.changed_by ?? null,
    closing: closing?.what ?? null,
    likely:
      movement.outlook === null || 'none' in movement.outlook || movement.outlook.likely === null ? null : dayText(movement.outlook.likely),
    boundary: movement.outlook === null || 'none' in movement.outlook ? null : movement.outlook.boundary,
  };
}

const finite = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** How it moved, in words: `assess.travel.<travel>.<by>`. */
export function travelWords(context: Context, facts: Facts): string {
  return say(
    context.plant.settings.language,
    `assess.travel.${facts['travel'] ?? 'steady'}.${facts['by']}`,
    shownFacts(context.plant.settings.units, facts),
  );
}

/** Sentence for the level of a verdict. */
export function reasonOf(context: Context, verdict: Verdict): Reason {
  const { language } = context.plant.settings;
  const { track, look, heldFrom, level } = verdict;
  if (level.rule === 'M1' && heldFrom !== null) return heldReason(context, verdict, heldFrom);
  if (look === null || verdict.movement === null) return { reason: say(language, 'assess.reason.none', {}), facts: {} };
  const facts: Facts = { ...factsOf(context, track, look, verdict.movement), rule: level.rule };
  const kind = look.zone !== null ? 'zone' : look.ratioClass !== null ? 'class' : 'shown';
  const parts = [
    say(language, `assess.reason.${kind}`, {
      ...shownFacts(context.plant.settings.units, facts),
      travel_words: travelWords(context, facts),
      limit_words: limitWords(context, facts),
    }),
  ];
  if (level.rule === 'R1' || level.rule === 'H1' || level.rule === 'K1' || level.rule === 'F1')
    parts.push(say(language, `assess.reason.${level.rule}`, facts));
  const among = context.sisters.get(track);
  if (among?.outlier === true) parts.push(say(language, 'assess.reason.S1', { n: among.n, db: among.dbAboveMedian }));
  if (doubtedHigh(look)) parts.push(say(language, 'assess.reason.M4', facts));
  return { reason: parts.join(' '), facts };
}

function heldReason(context: Context, verdict: Verdict, from: Look): Reason {
  const { track, look } = verdict;
  const reading = track.readings[context.current] ?? null;
  const facts: Facts = {
    point: pointWords(track),
    quantity: track.series.quantity,
    value: from.value,
    unit: unitWords(track),
    condition: from.zone ?? from.ratioClass ?? 'not assessed',
    date: dayText(from.reading.day),
    status: look !== null ? 'doubted' : reading === null || reading.status === 'measured' ? 'missing' : reading.status,
    doubt: look?.doubts.find((d) => d.effect === 'held')?.kind ?? null,
    rule: 'M1',
  };
  const { language } = context.plant.settings;
  const variant = look === null ? '' : facts['doubt'] === null ? '.unseen' : '.doubted';
  const doubt = facts['doubt'] === null ? null : say(language, `assess.doubt_name.${facts['doubt']}`);
  return { reason: say(language, `assess.reason.M1${variant}`, { ...shownFacts(context.plant.settings.units, facts), doubt }), facts };
}

/** The boundary that the reading lies above, or the one ahead of it, in words. */
function limitWords(context: Context, facts: Facts): string {
  const name = { A: 'ab', B: 'bc', C: 'bc', D: 'cd' }[String(facts['condition'])];
  const limit = name === undefined ? null : (facts[name] ?? null);
  const above = facts['condition'] === 'C' || facts['condition'] === 'D';
  if (limit === null || name === undefined) return '';
  return say(
    context.plant.settings.language,
    above ? 'assess.limit.above' : 'assess.limit.below',
    shownFacts(context.plant.settings.units, { boundary: `${name[0]}/${name[1]}`.toUpperCase(), limit, unit: facts['unit'] ?? '' }),
  );
}
