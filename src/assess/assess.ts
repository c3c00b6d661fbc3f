/**
 * The assessment: Plant in, Record out, pure. The steps run in the order of the rules: each reading is looked at in its
 * own time, doubts are raised beside it, then the current survey is judged, machines, coverage and actions follow.
 */
import type { Machine, Plant } from '../plant/types.ts';
import { RECORD_FORMAT, type Condition, type RecordMeasurement, type SwayfolioRecord } from '../record/types.ts';
import { actionsOf, reportedFindings } from './actions.ts';
import { cautionsIn } from './cautions.ts';
import { closedActions } from './closing.ts';
import { coverageLines, inService, lastMeasured, usualIntervalDays } from './coverage.ts';
import { cutAt } from './cut.ts';
import { raiseDoubts } from './doubts/raise.ts';
import { type Standing, verdictOf } from './level.ts';
import { LimitBook } from './limits-in-force.ts';
import { limitSetLines, plantLine, plantOverTime, policyHash, policyLines, surveyHead, surveyLines } from './lines.ts';
import { lookAt } from './look.ts';
import { type Assessed, assessMachine, componentLines, conditionAt, machineLine } from './machine.ts';
import { measurementOf } from './measurement.ts';
import { rankedActions } from './rank.ts';
import { ruleLines } from './rules.ts';
import { sistersOf } from './sisters.ts';
import { spareOf } from './spare.ts';
import { type Context, dayAt, machineRow, type Track, tracksOf } from './track.ts';
import { verifiedNow } from './verification.ts';

export interface AssessOptions {
  /** Id of the survey; null = the last. */
  readonly survey: string | null;
  readonly toolVersion: string;
}

/** Throws UserError for a survey that does not exist. */
export function assess(plant: Plant, options: AssessOptions): SwayfolioRecord {
  const context = contextOf(cutAt(plant, options.survey));
  const book = new LimitBook(context);
  for (let survey = 0; survey <= context.current; survey += 1) {
    lookAt(context, book, survey);
    raiseDoubts(context, survey);
  }
  for (const [track, among] of sistersOf(context)) context.sisters.set(track, among);
  const machines = context.plant.machines.filter((m) => inService(m, dayAt(context, context.current)));
  const assessed = machines.map((machine) => judge(context, machine));
  return recordOf(context, book, assessed, options.toolVersion);
}

function contextOf(plant: Plant): Context {
  const tracks = tracksOf(plant);
  const byMachine = new Map<string, Track[]>(plant.machines.map((m) => [m.id, []]));
  for (const track of tracks) byMachine.get(track.machine.id)?.push(track);
  return {
    plant,
    policy: plant.policy,
    current: plant.surveys.length - 1,
    tracks,
    byMachine,
    closedActions: closedActions(plant.actions),
    sisters: new Map(),
    usualIntervalDays: usualIntervalDays(plant.surveys),
  };
}

function judge(context: Context, machine: Machine): Assessed {
  const spare = spareOf(context, machine);
  const standing: Standing = {
    criticality: machineRow(machine, dayAt(context, context.current)).criticality ?? 'essential',
    spare: spare?.proven === true,
    verified: verifiedNow(context, machine.id),
  };
  const verdicts = (context.byMachine.get(machine.id) ?? []).map((track) => verdictOf(context, track, standing));
  return assessMachine(context, machine, verdicts, standing, spare);
}

/** Condition at the last survey before this one at which the machine was measured, by today's rules. */
function previousCondition(context: Context, machine: Machine): Condition | null {
  const tracks = context.byMachine.get(machine.id) ?? [];
  const before = lastMeasured(tracks, context.current - 1);
  return before < 0 ? null : (conditionAt(tracks, before) ?? 'not assessed');
}

function recordOf(context: Context, book: LimitBook, assessed: readonly Assessed[], version: string): SwayfolioRecord {
  const { plant } = context;
  const survey = plant.surveys[context.current] as Plant['surveys'][number];
  const surveys = surveyLines(context);
  const policy = policyLines(plant);
  const machines = assessed.map((a) => machineLine(context, a, previousCondition(context, a.machine)));
  const measurements: RecordMeasurement[] = assessed.flatMap((a) => a.verdicts.map((verdict) => measurementOf(context, book, verdict)));
  const reported = reportedFindings(context);
  const used = context.tracks.flatMap((t) => t.looks.flatMap((look) => (look === null ? [] : [look.limits])));
  return {
    format: RECORD_FORMAT,
    tool: { name: 'swayfolio', version },
    issue: null,
    plant: plantLine(plant),
    survey: surveyHead(survey),
    surveys,
    policy,
    policy_hash: policyHash(policy),
    rules: ruleLines(plant.settings.language),
    limit_sets: limitSetLines(new Set(used)),
    cautions: cautionsIn(plant.settings.language),
    machines,
    components: assessed.flatMap((a) => componentLines(context, a)),
    measurements,
    actions: rankedActions(
      context,
      assessed.flatMap((a) => actionsOf(context, a, reported)),
    ),
    coverage: coverageLines(context),
    plant_over_time: plantOverTime(context, surveys, machines),
    problems: plant.problems,
    inputs: plant.inputs.map((i) => ({ path: i.path, bytes: i.bytes, sha256: i.sha256 })),
  };
}
