/**
 * The Comparison: the years side by side, the second contract between computing and writing. In: a Comparison. Out: its types, its JSON
 * Schema, its text. What is absent is null; a figure names its record, file and line.
 */
import { z } from 'zod';

export const COMPARISON_FORMAT = 1;

const text = z.string();
const maybe = z.string().nullable();
const count = z.number().int();
/** Where a figure comes from: `record` is the issued folder or file, `file` and `line` stand in its inputs/. */
const place = { record: text, file: maybe, line: count.nullable(), date: maybe, instrument: maybe, person: maybe };
const series = { machine: text, point: text, quantity: text, detection: maybe };

const comparedRecord = z.strictObject({
  record: text,
  number: maybe,
  revision: count.nullable(),
  survey: text,
  date: text,
  format: count,
  tool: text,
  policy_hash: text,
  issued_on: maybe,
  reviewed_by: maybe,
  approved_by: maybe,
});
const verdict = z.strictObject({
  machine: text,
  name: maybe,
  criticality: text,
  survey: text,
  issued: text,
  today: text,
  /** Null where both are one; else each reading whose class differs, with both limits. */
  why: maybe,
  point: maybe,
  quantity: maybe,
  value: z.number().nullable(),
  unit: maybe,
  limit_set: maybe,
  ...place,
});
const CHANGES = [
  'limits',
  'limit set',
  'baseline',
  'policy',
  'point',
  'id',
  'unit',
  'machine',
  'instrument',
  'calibration',
  'person',
  'qualification',
] as const;
const change = z.strictObject({
  kind: z.enum(CHANGES),
  of: text,
  before: maybe,
  after: maybe,
  since: text,
  by: maybe,
  previous_record: text,
  record: text,
});
const pastDue = z.strictObject({
  kind: z.enum(['calibration', 'qualification']),
  of: text,
  ended: text,
  survey: text,
  readings: count,
  ...place,
});
const restated = z.strictObject({
  ...series,
  survey: text,
  unit: text,
  before: maybe,
  after: maybe,
  before_record: text,
  before_file: maybe,
  before_line: count.nullable(),
  ...place,
});
const coverage = z.strictObject({
  machine: text,
  name: maybe,
  criticality: text,
  surveys: z.array(z.strictObject({ record: text, survey: text, date: text, status: text, measured: count, of: count, why: maybe })),
  longest_days: count.nullable(),
  from: maybe,
  to: maybe,
  /** Calendar quarters between the first and the last survey in which nothing of the machine was measured, e.g. `2019 Q3`. */
  quarters_missed: z.array(text),
});
const vanished = z.strictObject({ ...series, last_record: text, since: text, record: text });
const action = z.strictObject({
  action: text,
  machine: text,
  points: z.array(text),
  recommendation: maybe,
  raised: maybe,
  first_record: text,
  last_record: text,
  times_reported: count,
  ordered: maybe,
  work_order: maybe,
  closed: maybe,
  closed_by: maybe,
  status: text,
  verification: maybe,
  before: maybe,
  after: maybe,
  days_open: count.nullable(),
  flags: z.array(text),
  recurs: maybe,
});
const forecast = z.strictObject({
  ...series,
  survey: text,
  boundary: text,
  limit: z.number(),
  unit: text,
  earliest: text,
  likely: maybe,
  latest: maybe,
  came: text,
  outcome: z.enum([
    'within the range',
    'before the range',
    'after the range',
    'not crossed so far',
    'new baseline first',
    'no reading since',
  ]),
  ...place,
});
const asFound = z.strictObject({
  action: text,
  machine: text,
  said: maybe,
  cause: maybe,
  as_found: text,
  closed: maybe,
  closed_by: maybe,
  record: text,
});

export const COMPARISON = z.strictObject({
  format: z.literal(COMPARISON_FORMAT),
  tool: z.strictObject({ name: text, version: text }),
  plant: text,
  language: text,
  paper: z.enum(['A4', 'Letter']),
  accent: maybe,
  from: text,
  to: text,
  today: z.strictObject({ of: text, survey: text, policy_hash: text }),
  records: z.array(comparedRecord).min(1),
  cautions: z.array(text).min(1),
  notes: z.array(text),
  restated: z.array(restated),
  verdicts: z.array(verdict),
  changes: z.array(change),
  past_due: z.array(pastDue),
  coverage: z.array(coverage),
  vanished: z.array(vanished),
  actions: z.array(action),
  forecasts: z.array(forecast),
  as_found: z.array(asFound),
});

export type Comparison = z.infer<typeof COMPARISON>;
export type ComparedVerdict = z.infer<typeof verdict>;
export type ComparedChange = z.infer<typeof change>;
export type PastDue = z.infer<typeof pastDue>;
export type Restated = z.infer<typeof restated>;
export type ComparedCoverage = z.infer<typeof coverage>;
export type Vanished = z.infer<typeof vanished>;
export type ActionLife = z.infer<typeof action>;
export type ComparedForecast = z.infer<typeof forecast>;
export type AsFound = z.infer<typeof asFound>;

export const comparisonJsonSchema = (): unknown => ({ title: 'comparison.json of swayfolio compare', ...z.toJSONSchema(COMPARISON) });

/** The text of comparison.json: an item a line. Its numbers are those of the records, which are rounded already. Throws for what the schema does not know. */
export function writeComparison(comparison: Comparison): string {
  const lines = Object.entries(COMPARISON.parse(comparison)).map(
    ([key, value]) =>
      `${JSON.stringify(key)}: ${Array.isArray(value) && value.length > 0 ? `[\n${value.map((item) => JSON.stringify(item)).join(',\n')}\n]` : JSON.stringify(value)}`,
  );
  return `{\n${lines.join(',\n')}\n}\n`;
}
