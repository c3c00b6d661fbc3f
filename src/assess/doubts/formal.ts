import { dayText } from '../../plant/day.ts';
import type { Reading, Survey } from '../../plant/types.ts';
import { exceeds } from '../exceeds.ts';
import { type Context, isMeasured, type Look, type Track } from '../track.ts';
import { doubt } from './doubt.ts';

/** Doubts about how a reading of the current survey was taken: retakes, dates, calibration, qualification. They change no level. */
export function formalDoubts(context: Context): void {
  const survey = context.plant.surveys[context.current] as Survey;
  for (const track of context.tracks) {
    const look = track.looks[context.current];
    if (look === null || look === undefined) continue;
    retakes(context, look, track);
    dates(context, survey, look);
    calibration(context, survey, look);
    qualification(context, survey, look);
  }
}

function retakes(context: Context, look: Look, track: Track): void {
  const values = [
    ...(look.reading.retakes ?? []).filter((r): r is Reading & { value: number } => isMeasured(r)).map((r) => r.value),
    look.value,
  ];
  const [least, most] = [Math.min(...values), Math.max(...values)];
  if (!exceeds(most - least, context.policy['7.retake'] * least)) return;
  look.doubts.push(doubt(context.plant.settings, 'retake-differs', 'note', { least, most, unit: track.series.unit, takes: values.length }));
}

function dates(context: Context, survey: Survey, look: Look): void {
  const { day } = look.reading;
  const last = survey.issueDate ?? Math.max(survey.to, survey.day);
  const facts = { date: dayText(day), from: dayText(survey.from), to: dayText(survey.to) };
  const { settings } = context.plant;
  if (day > last) look.doubts.push(doubt(settings, 'date', 'note', facts, '.future'));
  else if (day < survey.from || day > survey.to) look.doubts.push(doubt(settings, 'date', 'note', facts));
}

function calibration(context: Context, survey: Survey, look: Look): void {
  const instrument = survey.instruments.find((i) => i.id === look.reading.instrument);
  const due = instrument?.calibrationDue ?? null;
  if (due === null || due >= look.reading.day) return;
  const facts = { instrument: look.reading.instrument, due: dayText(due), days: look.reading.day - due };
  look.doubts.push(doubt(context.plant.settings, 'calibration', 'note', facts));
}

function qualification(context: Context, survey: Survey, look: Look): void {
  const person = survey.people.find((p) => p.name === look.reading.measuredBy);
  const expires = person?.expires ?? null;
  if (person === undefined || expires === null || expires >= look.reading.day) return;
  look.doubts.push(doubt(context.plant.settings, 'qualification', 'note', { person: person.name, expires: dayText(expires) }));
}
