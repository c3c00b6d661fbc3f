import { say } from '../words/say.ts';
import { type Context, componentRow, dayAt, type Track } from './track.ts';

/** What the readings of a machine cannot show, by what is not measured on it (common practice). */
export function cannotSee(context: Context, tracks: readonly Track[]): string[] {
  const { language } = context.plant.settings;
  const quantities = new Set(tracks.map((t) => t.series.quantity));
  const day = dayAt(context, context.current);
  const rows = tracks.map((t) => componentRow(t, day));
  const hidden: string[] = [];
  const add = (what: string): void => {
    hidden.push(say(language, `assess.cannot.${what}`, {}));
  };
  if (!quantities.has('acceleration') && rows.some((r) => r.bearings !== 'plain')) add('bearing');
  if (rows.some((r) => r.bearings === 'plain') && !tracks.some((t) => t.series.rows.some((p) => p.measuredOn === 'shaft relative')))
    add('shaft');
  if (!quantities.has('displacement') && rows.some((r) => r.speedRpm !== null && r.speedRpm <= context.policy['1.slow.speed'])) add('slow');
  if (rows.some((r) => r.kind === 'motor' || r.kind === 'generator')) add('electrical');
  if (!tracks.some((t) => t.series.readings.some((r) => r.phase !== null))) add('phase');
  add('between');
  return hidden;
}
