/** The papers of the demo plant: settings, limits, events, ledger, findings. People, firms and numbers are invented. */
import type { Row } from './types.ts';

export const PLANT_YAML = `plant: Marrow Fen Sugar Works
client: Marrow Fen Sugar plc
site: Marrow Fen, Hall Lane
contract: MF-2023-07
procedure: VS-P-04 revision 3
contractor:
  name: Tidewater Condition Surveys
  address: 4 Sluice Yard, Pellworth
  contact: office@tidewater.example
language: en
paper: A4
peak_means: calculated
units:
  velocity: { unit: mm/s, detection: rms }
  frequency: Hz
next_stops:
  - 2026-03-02
  - { date: 2026-02-09, area: Packing annex }
retention: ten years
distribution:
  - Works manager
  - Maintenance planner
`;

const PEOPLE = `people:
  - { name: Signe Brødholt, role: analyst, category: ISO 18436-2 category II, certificate: TC-2291, expires: 2027-05-31 }
  - { name: Åsa Lindqvist, role: data collector, category: ISO 18436-2 category I, certificate: TC-3104, expires: 2025-12-31 }
instruments:
  - { id: VM-1, make: Merle, model: 3-channel meter, serial: M3-0071, band: 2 Hz to 10 kHz, calibrated_on: 2025-03-04, calibration_due: 2026-03-04, laboratory: Pellworth Calibration }
  - { id: VM-2, make: Merle, model: pocket meter, serial: MP-0418, band: 10 Hz to 1 kHz, calibrated_on: 2025-01-02, calibration_due: 2026-01-02, laboratory: Pellworth Calibration }
`;

export function surveyYaml(date: string, isLast: boolean, head = 'kind: routine\nscope: all'): string {
  const notified = isLast
    ? `notified:\n  - { who: Works manager, when: ${date} 11:20, how: by telephone and e-mail, about: JP-1C in zone D }\nissue_date: 2026-01-16\nreviewed_by: René Calvère\n`
    : '';
  return `from: ${date}\nto: ${date}\n${head}\n${PEOPLE}field_check: 10 m/s² at 159.2 Hz before and after, within 2 %\nprocess: campaign, 92 % of rated slice\n${notified}`;
}

const table = (columns: readonly string[], rows: readonly Row[]) => ({ columns, rows });

export const LIMITS = table(
  [
    'limit_set',
    'title',
    'basis',
    'source',
    'edition',
    'quantity',
    'unit',
    'detection',
    'measured_on',
    'low_hz',
    'high_hz',
    'ab',
    'bc',
    'cd',
    'alarm',
    'trip',
    'valid_from',
    'approved_by',
    'approved_on',
  ],
  [
    {
      limit_set: 'blower',
      title: 'Blower maker, housing velocity',
      basis: 'maker',
      source: 'manual KB 160',
      edition: '2011',
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      low_hz: 10,
      high_hz: 1000,
      bc: 9,
      cd: 14,
      approved_by: 'H. Ωverby',
      approved_on: '2023-09-12',
    },
    {
      limit_set: 'vacuum',
      title: 'Contract limits, vacuum pumps',
      basis: 'contract',
      source: 'MF-2023-07 annex C',
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      low_hz: 2,
      high_hz: 1000,
      ab: 2.8,
      bc: 4.5,
      cd: 7.1,
      approved_by: 'H. Ωverby',
      approved_on: '2023-09-12',
    },
    {
      limit_set: 'vacuum',
      title: 'Contract limits, vacuum pumps',
      basis: 'contract',
      source: 'MF-2023-07 annex C, amendment 1',
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      low_hz: 2,
      high_hz: 1000,
      ab: 2.8,
      bc: 5.0,
      cd: 7.1,
      valid_from: '2025-12-01',
      approved_by: 'H. Ωverby',
      approved_on: '2025-11-24',
    },
    {
      limit_set: 'contract-small',
      title: 'Contract limits, machines to 15 kW',
      basis: 'contract',
      source: 'MF-2023-07 annex C',
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      low_hz: 10,
      high_hz: 1000,
      ab: 0.71,
      bc: 1.8,
      cd: 4.5,
      approved_by: 'H. Ωverby',
      approved_on: '2023-09-12',
    },
    {
      limit_set: 'diesel-set',
      title: 'Diesel set, owner’s limits',
      basis: 'owner',
      source: 'MF-M-019',
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      low_hz: 10,
      high_hz: 1000,
      ab: 18,
      bc: 28,
      cd: 45,
      approved_by: 'H. Ωverby',
      approved_on: '2023-09-12',
    },
  ],
);

export const EVENTS = table(
  ['machine', 'component', 'point', 'quantity', 'date', 'event', 'new_baseline', 'serial_out', 'serial_in', 'notes'],
  [
    { machine: 'FD-01', component: 'fan', date: '2024-12-10', event: 'other', new_baseline: 'no', notes: 'casing relined' },
    { machine: 'CR-01', component: 'pump', date: '2025-10-02', event: 'other', new_baseline: 'no', notes: 'coupling changed' },
    { machine: 'ID-01', component: 'fan', date: '2025-12-03', event: 'balance', new_baseline: 'no', notes: 'wheel cleaned and balanced' },
    {
      machine: 'BFP-A',
      component: 'motor',
      date: '2025-09-08',
      event: 'exchanged',
      new_baseline: 'yes',
      serial_out: 'B-1182',
      serial_in: 'B-1207',
    },
  ],
);

export const RENAMES = table(
  ['kind', 'machine', 'old', 'new', 'since'],
  [{ kind: 'point', machine: 'KB-01', old: 'DE', new: '4H', since: '2025-01-01' }],
);

export const ACCEPTED = table(
  ['machine', 'point', 'quantity', 'up_to', 'until', 'by', 'reason'],
  [
    {
      machine: 'AF-03',
      point: '1H',
      quantity: 'velocity',
      up_to: 6.5,
      until: '2026-12-31',
      by: 'H. Ωverby',
      reason: 'duct to be replaced in the 2026 stop; reading has stood still for two campaigns',
    },
    {
      machine: 'AF-03',
      point: '1H',
      quantity: 'displacement',
      up_to: 70,
      until: '2026-12-31',
      by: 'H. Ωverby',
      reason: 'the same deviation told in displacement',
    },
  ],
);

export const ACTIONS = table(
  [
    'action',
    'finding',
    'machine',
    'raised',
    'recommendation',
    'due',
    'owner',
    'work_order',
    'status',
    'closed',
    'closed_by',
    'as_found',
    'verify_point',
    'verify_below',
    'notes',
  ],
  [
    {
      action: 'ID-01/2025-11-19/1',
      finding: 'F-31',
      machine: 'ID-01',
      raised: '2025-11-19',
      recommendation: 'Clean the wheel and balance it',
      due: '2025-12-19',
      owner: 'Boiler house',
      work_order: 'W-8812',
      status: 'done',
      closed: '2025-12-03',
      closed_by: 'Tidewater',
      as_found: 'deposits on four blades, 1.9 kg',
      verify_point: '3H',
    },
    {
      action: 'CR-01/2025-10-15/1',
      finding: 'F-29',
      machine: 'CR-01',
      raised: '2025-10-15',
      recommendation: 'Check the alignment and the coupling',
      due: '2025-11-14',
      owner: 'Evaporation',
      work_order: 'W-8744',
      status: 'ordered',
      verify_point: '2A',
    },
    {
      action: 'SB-02/2025-10-15/1',
      machine: 'SB-02',
      raised: '2025-10-15',
      recommendation: 'Find the cause at the drive end before the campaign ends',
      due: '2025-12-15',
      owner: 'Slicing',
      status: 'rejected',
      verify_point: '1H',
      notes: 'rejected by the works: no window before the stop of 2026-03-02',
    },
  ],
);
