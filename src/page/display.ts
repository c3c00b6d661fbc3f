/** A record in the plant's display units. In: the record. Out: the same with each reading, limit, change and target as it is shown. As typed stays as typed; a limit set keeps its own numbers. */
import { graduationOf, graduationText, type Shown, shownAs } from '../measure/display.ts';
import type { RecordAction, RecordMachine, RecordMeasurement, SeriesKey, SwayfolioRecord } from '../record/types.ts';

export function inDisplayUnits(record: SwayfolioRecord): SwayfolioRecord {
  const { units } = record.plant;
  const shown = new Map<string, Shown>();
  for (const m of record.measurements) shown.set(keyOf(m.machine, m), shownAs(units, m));
  if ([...shown.values()].every((s) => s.factor === 1)) return record;
  const follow = (machine: string, key: SeriesKey | null): SeriesKey | null =>
    key === null ? null : { ...key, detection: shown.get(keyOf(machine, key))?.detection ?? key.detection };
  return {
    ...record,
    machines: record.machines.map((m) => machineIn(record, m, follow)),
    measurements: record.measurements.map((m) => measurementIn(m, shown.get(keyOf(m.machine, m)) ?? { ...m, factor: 1 })),
    actions: record.actions.map((a) => actionIn(record, a)),
  };
}

const keyOf = (machine: string, key: SeriesKey): string => `${machine}\u001f${key.point}\u001f${key.quantity}\u001f${key.detection ?? ''}`;

const times = (value: number | null, factor: number): number | null => (value === null ? null : value * factor);

function machineIn(
  record: SwayfolioRecord,
  m: RecordMachine,
  follow: (machine: string, key: SeriesKey | null) => SeriesKey | null,
): RecordMachine {
  const accepted = m.accepted.map((a) => {
    if (a.unit === null) return a;
    const s = shownAs(record.plant.units, graduationOf(a.unit));
    return { ...a, up_to: a.up_to * s.factor, unit: graduationText(s) };
  });
  return { ...m, governed_by: follow(m.machine, m.governed_by), urgency_by: follow(m.machine, m.urgency_by), accepted };
}

function actionIn(record: SwayfolioRecord, a: RecordAction): RecordAction {
  const v = a.verification;
  const s = shownAs(record.plant.units, graduationOf(v?.target?.unit ?? a.unit ?? ''));
  if (s.factor === 1) return a;
  const point = <T extends { readonly value: number }>(p: T | null): T | null => (p === null ? null : { ...p, value: p.value * s.factor });
  const verification =
    v === null
      ? null
      : {
          ...v,
          target: v.target === null ? null : { ...v.target, value: v.target.value * s.factor, unit: graduationText(s) },
          before: point(v.before),
          after: point(v.after),
        };
  return {
    ...a,
    value: times(a.value, s.factor),
    limit: times(a.limit, s.factor),
    unit: a.unit === null ? null : graduationText(s),
    verification,
  };
}

function measurementIn(m: RecordMeasurement, s: Shown): RecordMeasurement {
  const f = s.factor;
  if (f === 1) return m;
  const change = (c: RecordMeasurement['change']): RecordMeasurement['change'] =>
    c === null
      ? null
      : { ...c, absolute: c.absolute * f, vector: c.vector === null ? null : { ...c.vector, amplitude: c.vector.amplitude * f } };
  return {
    ...m,
    unit: s.unit,
    detection: s.detection,
    value: times(m.value, f),
    limits:
      m.limits === null
        ? null
        : {
            ...m.limits,
            ab: times(m.limits.ab, f),
            bc: times(m.limits.bc, f),
            cd: times(m.limits.cd, f),
            alarm: times(m.limits.alarm, f),
            trip: times(m.limits.trip, f),
          },
    baseline: m.baseline === null ? null : { ...m.baseline, value: m.baseline.value * f },
    previous: m.previous === null ? null : { ...m.previous, value: m.previous.value * f },
    change: change(m.change),
    from_baseline: change(m.from_baseline),
    phase: m.phase === null ? null : { ...m.phase, amplitude: times(m.phase.amplitude, f) },
    history: { ...m.history, value: m.history.value.map((v) => times(v, f)) },
    // What the file says stands beside the figure it became.
    typed_unit: m.typed_unit ?? (m.typed === null ? null : m.unit),
  };
}
