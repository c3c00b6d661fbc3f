/**
 * What changed from one record to the next. In: two records that follow each other. Out: limits, baselines, policy, points, ids, units, people and
 * instruments that differ, from when and by whose approval. Never: what only a longer history brings.
 */
import type { ComparedChange } from '../record/comparison.ts';
import type { LimitSetLine, RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import { dateOf, type Ids, type Named, pairs, seriesText } from './compared.ts';

type Change = Omit<ComparedChange, 'previous_record' | 'record'>;

export const changesOf = (records: readonly Named[], ids: Ids): ComparedChange[] =>
  pairs(records).flatMap(([before, now]) =>
    changesBetween(before.record, now.record, ids).map((change) => ({ ...change, previous_record: before.name, record: now.name })),
  );

function changesBetween(before: SwayfolioRecord, now: SwayfolioRecord, ids: Ids): Change[] {
  return [
    ...limitChanges(before, now),
    ...policyChanges(before, now),
    ...idChanges(before, now),
    ...machineChanges(before, now, ids),
    ...seriesChanges(before, now, ids),
    ...instrumentChanges(before, now),
    ...peopleChanges(before, now),
  ];
}

/** The row of each set and quantity that is in force at the record's survey. */
function inForce(record: SwayfolioRecord): Map<string, LimitSetLine> {
  const found = new Map<string, LimitSetLine>();
  for (const line of record.limit_sets) {
    if (line.valid_from !== null && line.valid_from > dateOf(record)) continue;
    const key = `${line.id} ${line.quantity}${line.detection === null ? '' : ` ${line.detection}`}`;
    const other = found.get(key);
    if (other === undefined || (other.valid_from ?? '') <= (line.valid_from ?? '')) found.set(key, line);
  }
  return found;
}

const limitText = ({ boundaries: { ab, bc, cd }, unit, detection, edition }: LimitSetLine): string =>
  `${[ab, bc, cd].map((b) => b ?? '–').join('/')} ${unit}${detection === null ? '' : ` ${detection}`}${edition === null ? '' : `, edition ${edition}`}`;

function limitChanges(before: SwayfolioRecord, now: SwayfolioRecord): Change[] {
  const old = inForce(before);
  return [...inForce(now)].flatMap(([of, line]) => {
    const was = old.get(of);
    if (was === undefined || limitText(was) === limitText(line)) return [];
    const approved = line.approved_by === null ? null : `${line.approved_by}${line.approved_on === null ? '' : `, ${line.approved_on}`}`;
    return [
      {
        kind: 'limits',
        of,
        before: limitText(was),
        after: limitText(line),
        since: line.valid_from ?? dateOf(now),
        by: approved ?? now.survey.approved_by,
      },
    ];
  });
}

/** A change of one kind, from the record's survey on, by who approved its report. */
const changeAt = (
  now: SwayfolioRecord,
  kind: Change['kind'],
  of: string,
  before: string | null,
  after: string | null,
  since: string = dateOf(now),
): Change => ({ kind, of, before, after, since, by: now.survey.approved_by });

function policyChanges(before: SwayfolioRecord, now: SwayfolioRecord): Change[] {
  const old = new Map(before.policy.map((line) => [line.id, line]));
  return now.policy.flatMap((line) => {
    const was = old.get(line.id);
    return was === undefined || was.value === line.value
      ? []
      : [changeAt(now, 'policy', line.id, `${was.value} ${was.unit}`, `${line.value} ${line.unit}`)];
  });
}

function idChanges(before: SwayfolioRecord, now: SwayfolioRecord): Change[] {
  const text = (r: NonNullable<SwayfolioRecord['plant']['renames']>[number]): string => JSON.stringify([r.kind, r.machine, r.old, r.new]);
  const known = new Set((before.plant.renames ?? []).map(text));
  return (now.plant.renames ?? [])
    .filter((r) => !known.has(text(r)))
    .map((r) =>
      changeAt(
        now,
        'id',
        `${r.kind}${r.machine === null || r.kind === 'machine' ? '' : ` of ${r.machine}`}`,
        r.old,
        r.new,
        r.since ?? dateOf(now),
      ),
    );
}

function machineChanges(before: SwayfolioRecord, now: SwayfolioRecord, ids: Ids): Change[] {
  const old = new Map(before.machines.map((m) => [ids.machine(m.machine), m]));
  const present = new Set(now.machines.map((m) => ids.machine(m.machine)));
  const gone = before.machines
    .filter((m) => !present.has(ids.machine(m.machine)))
    .map((m) => changeAt(now, 'machine', m.machine, 'in the plant', 'gone'));
  const there = now.machines.flatMap((m) => {
    const was = old.get(ids.machine(m.machine));
    if (was === undefined) return [changeAt(now, 'machine', m.machine, null, 'new')];
    return was.criticality === m.criticality ? [] : [changeAt(now, 'machine', m.machine, was.criticality, m.criticality)];
  });
  return [...gone, ...there];
}

function seriesChanges(before: SwayfolioRecord, now: SwayfolioRecord, ids: Ids): Change[] {
  const old = ids.bySeries(before);
  const current = ids.bySeries(now);
  const machines = new Set(before.machines.map((m) => ids.machine(m.machine)));
  const gone = [...old].filter(([key]) => !current.has(key)).map(([, m]) => changeAt(now, 'point', seriesText(m), 'measured', 'gone'));
  const there = [...current].flatMap(([key, m]) => {
    const was = old.get(key);
    if (was !== undefined) return oneSeries(was, m, now);
    return machines.has(ids.machine(m.machine)) ? [changeAt(now, 'point', seriesText(m), null, 'new')] : [];
  });
  return [...gone, ...there];
}

function oneSeries(was: RecordMeasurement, m: RecordMeasurement, now: SwayfolioRecord): Change[] {
  const changes: Change[] = [];
  if (was.unit !== m.unit) changes.push(changeAt(now, 'unit', seriesText(m), was.unit, m.unit));
  if (was.limit_set !== m.limit_set)
    changes.push(changeAt(now, 'limit set', seriesText(m), was.limit_set ?? 'none', m.limit_set ?? 'none'));
  const [b, a] = [was.baseline, m.baseline];
  // A baseline of fewer than three readings fills up; what was settled, and what begins on another day, changed.
  const isSettled = b !== null && a !== null && (!b.provisional || b.n >= 3 || b.n === 0 || b.from !== a.from);
  if (isSettled && (b.value !== a.value || b.from !== a.from))
    changes.push(changeAt(now, 'baseline', seriesText(m), `${b.value} ${was.unit} from ${b.from}`, `${a.value} ${m.unit} from ${a.from}`));
  return changes;
}

type Lines = readonly { readonly [field: string]: string | null }[];

function instrumentChanges(before: SwayfolioRecord, now: SwayfolioRecord): Change[] {
  const instruments = (r: SwayfolioRecord): Lines =>
    r.survey.instruments.map((i) => ({
      id: i.id,
      body: `${i.make ?? ''} ${i.model ?? ''} serial ${i.serial ?? 'not stated'} band ${i.band ?? 'not stated'}`,
      paper: `calibrated ${i.calibrated_on ?? 'not stated'}, due ${i.calibration_due ?? 'not stated'}, certificate ${i.certificate ?? 'not stated'}, ${i.laboratory ?? 'laboratory not stated'}`,
    }));
  return listChanges(now, instruments(before), instruments(now), ['instrument', 'calibration']);
}

function peopleChanges(before: SwayfolioRecord, now: SwayfolioRecord): Change[] {
  const people = (r: SwayfolioRecord): Lines =>
    r.survey.people.map((p) => ({
      id: p.name,
      body: p.role,
      paper: `${p.category ?? 'category not stated'}, certificate ${p.certificate ?? 'not stated'}, expires ${p.expires ?? 'not stated'}`,
    }));
  return listChanges(now, people(before), people(now), ['person', 'qualification']);
}

/** Who came and who went, and what of those who stayed differs: themselves, or their papers. */
function listChanges(
  now: SwayfolioRecord,
  before: Lines,
  after: Lines,
  [kind, paper]: readonly [Change['kind'], Change['kind']],
): Change[] {
  const idOf = (line: Lines[number]): string => line['id'] ?? '';
  const old = new Map(before.map((line) => [idOf(line), line]));
  const present = new Set(after.map(idOf));
  const gone = before.filter((line) => !present.has(idOf(line))).map((line) => changeAt(now, kind, idOf(line), 'took part', 'no longer'));
  const there = after.flatMap((line) => {
    const was = old.get(idOf(line));
    if (was === undefined) return [changeAt(now, kind, idOf(line), null, `new: ${line['paper']}`)];
    const body =
      was['body'] === line['body'] ? [] : [changeAt(now, kind, idOf(line), was['body'] ?? 'not stated', line['body'] ?? 'not stated')];
    return was['paper'] === line['paper'] ? body : [...body, changeAt(now, paper, idOf(line), was['paper'] ?? null, line['paper'] ?? null)];
  });
  return [...gone, ...there];
}
