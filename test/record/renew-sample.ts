/**
 * Writes the sample of today's format again: seven machines of the demo plant. Only while that format is not released; from
 * then on the sample is kept as it is. Run by: node --import ./.tools/typescript.mjs test/record/renew-sample.ts
 */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { assess } from '../../src/assess/assess.ts';
import { RECORD_FORMAT, type RecordMachine, type RecordMeasurement, type SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { realShell } from '../../src/shell/shell.ts';
import { readPlant } from '../../src/survey/read.ts';

/** A deviation accepted, not measured, repaired and verified, act now, doubts, phase, values below the floor. */
const KEPT = ['AF-03', 'BFP-B', 'ID-01', 'JP-1C', 'PK-F1', 'TG-01', 'VP-01'];

/** The measurements that govern a machine, and its first three. */
function someOf(record: SwayfolioRecord, machine: RecordMachine): RecordMeasurement[] {
  const governs = (m: RecordMeasurement): boolean =>
    [machine.governed_by, machine.urgency_by].some((key) => key?.point === m.point && key.quantity === m.quantity);
  return record.measurements.filter((m) => m.machine === machine.machine).filter((m, i) => i < 3 || governs(m));
}

function cut(record: SwayfolioRecord): SwayfolioRecord {
  const isKept = (item: { readonly machine: string }): boolean => KEPT.includes(item.machine);
  return {
    ...record,
    machines: record.machines.filter(isKept),
    components: record.components.filter(isKept),
    measurements: record.machines.filter(isKept).flatMap((machine) => someOf(record, machine)),
    actions: record.actions.filter(isKept),
    coverage: record.coverage.filter(isKept),
    surveys: record.surveys.map((s) => ({
      ...s,
      conditions: Object.fromEntries(Object.entries(s.conditions).filter(([machine]) => KEPT.includes(machine))),
    })),
    survey: { ...record.survey, photos: record.survey.photos.slice(0, 1) },
  };
}

const root = fileURLToPath(new URL('../..', import.meta.url));
const { plant, problems } = readPlant(realShell, `${root}demo-survey`);
if (plant === null) throw new Error(problems.map((p) => p.message).join('\n'));
const record = assess(plant, { survey: null, toolVersion: '0.1.0' });
writeFileSync(`${root}test/records/format-${RECORD_FORMAT}.json`, writeRecord(cut(record)));
