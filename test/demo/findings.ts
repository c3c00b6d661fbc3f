/** What the analyst wrote, by survey: carried, reworded, confirmed. Invented. */
import type { Row } from './types.ts';

export const FINDING_COLUMNS = [
  'finding', 'machine', 'component', 'points', 'finding_text', 'likely_cause', 'less_likely', 'confidence', 'recommendation', 'needs_stop', 'check_first', 'consequence', 'downtime_h', 'parts', 'due', 'owner',
  'urgency', 'override_by', 'override_reason', 'override_until', 'verify_point', 'verify_below', 'carried_from', 'confirmed', 'closed',
];

const CR01: Row = {
  finding: 'F-29', machine: 'CR-01', component: 'pump', points: '2A', finding_text: 'Axial level trebled since the coupling was changed, radial level unchanged.', likely_cause: 'misalignment at the coupling',
  less_likely: 'a bent shaft, a cocked bearing', confidence: 'low', needs_stop: 'yes', check_first: 'Axial phase across the coupling, soft foot', consequence: 'Coupling and seal wear early', downtime_h: 6, owner: 'Evaporation', verify_point: '2A',
};

/** Carried on unchanged for three surveys. */
const LK01: Row = {
  finding: 'F-27', machine: 'LK-01', component: 'fan', points: '3H', finding_text: 'Radial level at the fan bearing stands in zone C and has not moved for three campaigns.', likely_cause: 'residual unbalance of the wheel', less_likely: 'a resonance of the pedestal',
  confidence: 'low', recommendation: 'Balance the wheel in place', needs_stop: 'yes', check_first: 'Spectrum, phase at the pedestal', consequence: 'Bearing life is shortened', downtime_h: 8, owner: 'Lime house', verify_point: '3H',
};

const SN03: Row = {
  finding: 'F-24', machine: 'SN-03', component: 'pump', points: '3H', finding_text: 'Drive end at 9.0 mm/s in zone D, steady since the first survey.', likely_cause: 'wear of the impeller by sand', less_likely: 'a loose pedestal', confidence: 'low',
  recommendation: 'Open the pump, look at impeller and pedestal', needs_stop: 'yes', check_first: 'Pedestal bolts; spectrum', consequence: 'Seal and bearing go early', downtime_h: 5, owner: 'Slicing', verify_point: '3H',
};

const DR01: Row = {
  finding: 'F-32', machine: 'DR-01', component: 'motor', points: '2V', finding_text: 'Vertical level overtook the horizontal in November and stays at 3.3 mm/s.', likely_cause: 'lost vertical stiffness: foot bolts or grout', confidence: 'low',
  recommendation: 'Check foot bolts and grout, then read again', needs_stop: 'yes', check_first: 'Phase at the feet', consequence: 'The foot cracks or the alignment goes', downtime_h: 3, owner: 'Pulp house', verify_point: '2V',
};

const JP1A: Row = {
  finding: 'F-25', machine: 'JP-1A', component: 'pump', points: '3H', finding_text: 'Pump drive end in zone C at 6.0 mm/s, unchanged since the first survey; JP-1B can stand in.', likely_cause: 'flow away from the best point, or unbalance', confidence: 'low',
  recommendation: 'Look at impeller and wear ring when the pump is open in the stop', needs_stop: 'yes', check_first: 'Spectrum at two flows', consequence: 'Bearing life is shortened', downtime_h: 6, due: '2026-03-02', owner: 'Purification', verify_point: '3H',
};

const EV02: Row = {
  finding: 'F-26', machine: 'EV-02', component: 'motor', points: '2H', finding_text: 'Drive end in zone C at 3.2 mm/s, steady.', likely_cause: 'coupling or foot', confidence: 'low', recommendation: 'Check alignment and soft foot',
  needs_stop: 'yes', check_first: 'Phase across the coupling', consequence: 'Bearing life is shortened', downtime_h: 5, owner: 'Evaporation', verify_point: '2H',
};

const ID01: Row = { finding: 'F-31', machine: 'ID-01', component: 'fan', points: '3H' };

export const FINDINGS: Readonly<Record<string, readonly Row[]>> = {
  '2025-10-15': [
    { ...CR01, finding_text: 'Axial level doubled since the coupling was changed, radial level unchanged.', recommendation: 'Check the alignment and the coupling', confirmed: '2025-10-15' },
    { ...LK01, confirmed: '2025-10-15' },
    { ...SN03, confirmed: '2025-10-15' },
    { ...JP1A, confirmed: '2025-10-15' },
    { ...EV02, confirmed: '2025-10-15' },
  ],
  '2025-11-19': [
    { ...ID01, finding_text: 'Level rose from 4.6 to 7.9 in five weeks, radial, at running speed by ear and strobe.', likely_cause: 'unbalance from deposits', confidence: 'medium', recommendation: 'Clean the wheel and balance it', needs_stop: 'yes', owner: 'Boiler house', confirmed: '2025-11-19' },
    { ...CR01, recommendation: 'Align pump and motor at the next wash-out', carried_from: '2025-10-15', confirmed: '2025-11-19' },
    { ...LK01, carried_from: '2025-10-15', confirmed: '2025-11-19' },
    { ...SN03, carried_from: '2025-10-15', confirmed: '2025-11-19' },
    { ...JP1A, carried_from: '2025-10-15', confirmed: '2025-11-19' },
    { ...EV02, carried_from: '2025-10-15', confirmed: '2025-11-19' },
    { ...DR01, confirmed: '2025-11-19' },
  ],
  '2026-01-14': [
    {
      finding: 'F-34', machine: 'JP-1C', component: 'pump', points: '3H; 3A', finding_text: 'Pump drive end jumped from 2.1 to 9.1 mm/s between two surveys, axial with it; told to the works manager before leaving site.',
      likely_cause: 'a loose or broken part, or an obstruction', less_likely: 'unbalance', confidence: 'low', recommendation: 'Change over to JP-1B and open the pump', needs_stop: 'yes', check_first: 'Repeat the reading with a second instrument; look at feet and pipe supports',
      consequence: 'Secondary damage to seal and bearings', due: '2026-01-14', owner: 'Purification', confirmed: '2026-01-14',
    },
    {
      finding: 'F-33', machine: 'BFP-A', component: 'pump', points: '4H', finding_text: 'Acceleration at the outboard bearing has risen three and a half times since the baseline; velocity has not moved.',
      likely_cause: 'early bearing damage or poor lubrication', less_likely: 'flow noise, a rub', confidence: 'medium', recommendation: 'Plan a change of the outboard bearing; bring BFP-B into service before', needs_stop: 'yes',
      check_first: 'Repeat with the same mount; spectrum; grease by amount and re-measure', consequence: 'Loss of the feed pump with no proven spare', downtime_h: 14, parts: 'outboard bearing set', due: '2026-01-21', owner: 'Boiler house', confirmed: '2026-01-14',
    },
    {
      finding: 'F-35', machine: 'PW-02', component: 'pump', points: '3H', finding_text: 'All points of the train rose by about 1.4 together; the pump drive end is now in zone C.', likely_cause: 'a common cause: flow, speed or base', confidence: 'low',
      recommendation: 'Repeat the reading with flow and speed noted, then check base bolts and suction', needs_stop: 'no', check_first: 'Flow and speed of the day', consequence: 'Bearings and seal wear early', owner: 'Pulp house', verify_point: '3H', confirmed: '2026-01-14',
    },
    {
      finding: 'F-36', machine: 'MA-01', component: 'motor', points: '1H', finding_text: 'Horizontal level rose from 1.0 to 2.5 mm/s; the vertical has not moved.', likely_cause: 'low stiffness in one direction, or a resonance', confidence: 'low', recommendation: 'Re-measure and find why: look at base frame and belt',
      needs_stop: 'no', check_first: 'Bump test, change of speed', owner: 'Crystallisation', urgency: 'next planned stop', override_by: 'René Calvère', override_reason: 'base frame is exchanged in the stop of 2026-03-02 in any case; the operator reads it each week until then',
      override_until: '2026-03-02', confirmed: '2026-01-14',
    },
    { ...CR01, recommendation: 'Align pump and motor, check the coupling and the foot', carried_from: '2025-11-19', confirmed: '2026-01-14' },
    { ...LK01, carried_from: '2025-11-19' },
    { ...SN03, carried_from: '2025-11-19', confirmed: '2026-01-14' },
    { ...JP1A, carried_from: '2025-11-19', confirmed: '2026-01-14' },
    { ...EV02, recommendation: 'Take the scaffold down and measure; then check alignment and soft foot', due: '2026-02-13', carried_from: '2025-11-19', confirmed: '2026-01-14' },
    { ...DR01, carried_from: '2025-11-19', confirmed: '2026-01-14' },
    { ...ID01, finding_text: 'Cleaned and balanced on 2025-12-03; level back at 1.9.', recommendation: 'None further', carried_from: '2025-11-19', confirmed: '2026-01-14', closed: '2026-01-14' },
  ],
};
