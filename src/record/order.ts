/**
 * The order of keys in record.json, from the one table of fields. A key that is not listed is a bug, so that the written
 * record and its types cannot drift apart.
 */
import { type Field, fieldsOf, OBJECTS, RECORD_FIELDS } from './fields.ts';

export type Order = readonly string[];

const names = (fields: readonly Field[]): Order => fields.map((f) => f.name);

export const RECORD: Order = names(RECORD_FIELDS);

/** Order by the name of the key under which an object, or each object of a list, stands. */
export const ORDERS: Readonly<Record<string, Order>> = Object.fromEntries(
  Object.entries(OBJECTS).map(([name, fields]) => [name, names(fields)]),
);

/** Maps whose keys are data (machine ids, quantities, facts, survey indices); written in the order of their keys by code unit. */
export const MAPS: ReadonlySet<string> = new Set(['conditions', 'units', 'facts', 'why', 'sisters']);

/** Fields of a quantity's display unit in plant.units. */
export const UNIT_FIELDS: readonly Field[] = fieldsOf('unit:s? detection:w?:detection');
/** Values of these maps are objects of their own. */
export const MAP_VALUES: Readonly<Record<string, Order>> = { units: names(UNIT_FIELDS) };
