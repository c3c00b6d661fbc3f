/**
 * The shape of plant.yaml and survey.yaml. In: text values. Out: typed ones. The JSON Schema of plant.yaml that is published
 * with the package comes from the same definitions.
 */
import { z } from 'zod';
import { POLICY_IDS } from '../plant/policy.ts';
import { type Day, parseDay } from '../plant/day.ts';
import { SURVEY_KINDS } from '../plant/types.ts';
import { plainNumber } from './cells.ts';
import { importJsonSchema, importSchema, NO_IMPORTS } from './mapping.ts';

const blankToNull = (value: unknown): unknown => (value === '' || value === undefined ? null : value);

/** Text, blank as null, in Unicode NFC. */
const text = z
  .preprocess(blankToNull, z.union([z.string(), z.null()]))
  .transform((v) => (v === null ? null : v.normalize('NFC').trim() || null))
  .default(null);
const date = z
  .preprocess(blankToNull, z.union([z.string(), z.null()]))
  .transform((v, ctx): Day | null => {
    if (v === null) return null;
    const day = parseDay(v.trim());
    if (day === null) ctx.addIssue({ code: 'custom', message: `"${v}" is no date; write YYYY-MM-DD` });
    return day;
  })
  .default(null);
const number = z.string().transform((v, ctx): number => {
  const value = plainNumber(v.trim());
  if (typeof value === 'number') return value;
  ctx.addIssue({ code: 'custom', message: `"${v}" is no plain number` });
  return 0;
});
const texts = z
  .preprocess((v) => (v === '' || v === null || v === undefined ? [] : typeof v === 'string' ? [v] : v), z.array(z.string()))
  .transform((list) => list.map((v) => v.normalize('NFC').trim()).filter((v) => v !== ''))
  .default([]);
const wordOf = <const W extends readonly [string, ...string[]]>(words: W) =>
  z.preprocess(blankToNull, z.union([z.enum(words), z.null()], { error: `is none of: ${words.join(', ')}` })).default(null);

const contractor = z.object({ name: text, address: text, contact: text, logo: text, accent: text });
const displayUnit = z.union([
  z.string().transform((unit) => ({ unit, detection: null as string | null })),
  z.object({ unit: text, detection: text }),
]);
const stop = z.union([date, z.object({ date, area: text })]);

export const plantSchema = z.object({
  plant: text,
  client: text,
  site: text,
  contract: text,
  procedure: text,
  contractor: z
    .preprocess((v) => (typeof v === 'string' ? { name: v } : (blankToNull(v) ?? {})), contractor)
    .default({ name: null, address: null, contact: null, logo: null, accent: null }),
  language: wordOf(['en', 'de', 'es', 'fr']),
  paper: wordOf(['A4', 'Letter']),
  units: z.preprocess((v) => blankToNull(v) ?? {}, z.record(z.string(), displayUnit)).default({}),
  peak_means: wordOf(['calculated', 'true']),
  next_stops: z
    .preprocess(
      (v) =>
        v === '' || v === null || v === undefined
          ? []
          : Array.isArray(v)
            ? v
            : typeof v === 'object'
              ? byArea(v as Record<string, unknown>)
              : [v],
      z.array(stop),
    )
    .default([]),
  policy: z.preprocess((v) => blankToNull(v) ?? {}, z.record(z.string(), number)).default({}),
  retention: text,
  distribution: texts,
  import: z.preprocess((v) => blankToNull(v) ?? {}, importSchema).default(NO_IMPORTS),
});

/** `next_stops: { area: [dates] }` as a list of date and area. */
function byArea(stops: Record<string, unknown>): unknown[] {
  return Object.entries(stops).flatMap(([area, dates]) => (Array.isArray(dates) ? dates : [dates]).map((d) => ({ date: d, area })));
}

const listOf = <T extends z.ZodType>(item: T) =>
  z.preprocess((v) => (v === '' || v === null || v === undefined ? [] : Array.isArray(v) ? v : [v]), z.array(item)).default([] as never);
const named =
  (key: string) =>
  (v: unknown): unknown =>
    typeof v === 'string' ? { [key]: v } : v;

const scope = z.union([
  z
    .preprocess(blankToNull, z.union([z.literal('all'), z.null()]))
    .transform(() => ({ all: true, areas: [] as string[], routes: [] as string[], machines: [] as string[] })),
  z
    .object({ areas: texts, routes: texts, machines: texts })
    .transform((v) => ({ all: v.areas.length + v.routes.length + v.machines.length === 0, ...v })),
]);

export const surveySchema = z.object({
  from: date,
  to: date,
  kind: wordOf(SURVEY_KINDS),
  scope: scope.default({ all: true, areas: [], routes: [], machines: [] }),
  people: listOf(z.preprocess(named('name'), z.object({ name: z.string(), role: text, category: text, certificate: text, expires: date }))),
  instruments: listOf(
    z.preprocess(
      named('id'),
      z.object({
        id: z.string(),
        make: text,
        model: text,
        serial: text,
        band: text,
        calibrated_on: date,
        calibration_due: date,
        certificate: text,
        laboratory: text,
      }),
    ),
  ),
  sensors: listOf(
    z.preprocess(named('id'), z.object({ id: z.string(), serial: text, sensitivity: text, mounting: text, calibration_due: date })),
  ),
  field_check: text,
  process: text,
  weather: text,
  remarks: text,
  issue_date: date,
  reviewed_by: text,
  approved_by: text,
  notified: listOf(z.preprocess(named('who'), z.object({ who: z.string(), when: text, how: text, about: text }))),
});

export const PLANT_KEYS = Object.keys(plantSchema.shape);
export const SURVEY_KEYS = Object.keys(surveySchema.shape);

/** JSON Schema (draft 2020-12) of plant.yaml, published with the package. */
export function plantJsonSchema(): object {
  const value = { type: ['string', 'number', 'null'] };
  const textSchema = { type: ['string', 'null'] };
  const dateSchema = { type: ['string', 'null'], pattern: '^\\d{4}-\\d{2}-\\d{2}$' };
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    title: 'plant.yaml of a swayfolio plant folder',
    type: 'object',
    properties: {
      plant: textSchema,
      client: textSchema,
      site: textSchema,
      contract: textSchema,
      procedure: textSchema,
      contractor: {
        type: ['object', 'string', 'null'],
        properties: { name: textSchema, address: textSchema, contact: textSchema, logo: textSchema, accent: textSchema },
      },
      language: { enum: ['en', 'de', 'es', 'fr', null] },
      paper: { enum: ['A4', 'Letter', null] },
      units: {
        type: ['object', 'null'],
        additionalProperties: { anyOf: [{ type: 'string' }, { type: 'object', properties: { unit: textSchema, detection: textSchema } }] },
      },
      peak_means: { enum: ['calculated', 'true', null] },
      next_stops: {
        anyOf: [
          { type: 'array', items: { anyOf: [dateSchema, { type: 'object', properties: { date: dateSchema, area: textSchema } }] } },
          { type: 'object' },
          { type: 'null' },
        ],
      },
      policy: {
        type: ['object', 'null'],
        properties: Object.fromEntries(POLICY_IDS.map((id) => [id, value])),
        additionalProperties: false,
      },
      retention: textSchema,
      distribution: { type: ['array', 'string', 'null'], items: { type: 'string' } },
      import: importJsonSchema(),
    },
    required: ['plant'],
  };
}
