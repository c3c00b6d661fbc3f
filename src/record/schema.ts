/**
 * JSON Schema (draft 2020-12) of record.json, published with the package. In: the table of fields. Out: the schema. Never:
 * a field of its own.
 */
import { type Field, OBJECTS, RECORD_FIELDS, WORDS } from './fields.ts';
import { UNIT_FIELDS } from './order.ts';
import { RECORD_FORMAT } from './types.ts';

type Schema = Readonly<Record<string, unknown>>;

const TEXT: Schema = { type: 'string' };
const FACT: Schema = { type: ['string', 'number', 'boolean', 'null', 'array'], items: { type: ['string', 'number'] } };
const mapOf = (values: Schema): Schema => ({ type: 'object', additionalProperties: values });

const PLAIN: Readonly<Record<string, Schema>> = {
  s: TEXT,
  n: { type: 'number' },
  i: { type: 'integer' },
  b: { type: 'boolean' },
  d: { type: 'string', pattern: '^\\d{4}-\\d{2}-\\d{2}$' },
  S: { type: 'array', items: TEXT },
  V: { type: 'array', items: { type: ['number', 'null'] } },
  T: { type: 'array', items: { type: ['string', 'null'] } },
  P: { type: 'array', items: { type: 'integer' }, minItems: 2, maxItems: 2 },
  F: mapOf(FACT),
  C: mapOf({ enum: WORDS['condition'] }),
  W: mapOf(TEXT),
  I: { type: 'object', propertyNames: { enum: WORDS['condition'] }, additionalProperties: { type: 'integer' } },
};

function kindSchema(field: Field): Schema {
  const plain = PLAIN[field.kind];
  if (plain !== undefined) return plain;
  if (field.kind === 'w') return { enum: WORDS[field.of] };
  if (field.kind === 'U') return mapOf(objectSchema(UNIT_FIELDS));
  const reference = { $ref: `#/$defs/${field.of}` };
  return field.kind === 'o' ? reference : { type: 'array', items: reference };
}

const fieldSchema = (field: Field): Schema => (field.orNull ? { anyOf: [kindSchema(field), { type: 'null' }] } : kindSchema(field));

function objectSchema(fields: readonly Field[]): Schema {
  return {
    type: 'object',
    properties: Object.fromEntries(fields.map((field) => [field.name, fieldSchema(field)])),
    required: fields.filter((field) => !field.orAbsent).map((field) => field.name),
    additionalProperties: false,
  };
}

/** A forecast is dates, all of them, or the reason why there are none. */
function forecastSchema(fields: readonly Field[]): Schema {
  const whole = fields.map((field) => ({ ...field, orAbsent: false }));
  return {
    anyOf: [objectSchema(whole.filter((field) => field.name !== 'none')), objectSchema(whole.filter((field) => field.name === 'none'))],
  };
}

/** What the table cannot say of the keys at the top. */
const AT_TOP: Readonly<Record<string, Schema>> = {
  format: { const: RECORD_FORMAT },
  policy_hash: { type: 'string', pattern: '^[0-9a-f]{64}$' },
  cautions: { type: 'array', items: TEXT, minItems: 1 },
};

export function recordJsonSchema(): Schema {
  const top = objectSchema(RECORD_FIELDS);
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    title: 'record.json of a swayfolio report',
    ...top,
    properties: { ...(top['properties'] as Schema), ...AT_TOP },
    $defs: Object.fromEntries(
      Object.entries(OBJECTS).map(([name, fields]) => [name, name === 'forecast' ? forecastSchema(fields) : objectSchema(fields)]),
    ),
  };
}
