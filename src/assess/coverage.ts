/**
 * Coverage: what was due, what was measured, what was missed and how often in a row. In: tracks and surveys. Out: a line
 * for each machine in service. Never: a stopped or unreachable machine counted as good.
 */
import { type Day, dayText } from '../plant/day.ts';
import type { Machine, Reading, Survey } from '../plant/types.ts';
import type { CoverageLine, Status } from '../record/types.ts';
import { floorFor } from './floor.ts';
import { median } from './statistics/median.ts';
import { type Context, dayAt, isMeasured, machineRow, pointRow, type Track } from './track.ts';

/** Surveys whose gaps tell the usual interval. */
const INTERVAL_SURVEYS = 6;

/** Interval in days: stated, else the median gap of the last six surveys (repeats left out); null with one survey. */
export function intervalOf(context: Context, machine: Machine): number | null {
  const stated = machineRow(machine, dayAt(context, context.current)).intervalDays;
  return stated ?? context.usualIntervalDays;
}

export function usualIntervalDays(surveys: readonly Survey[]): number | null {
  const days = surveys
    .filter((s) => s.kind === 'routine')
    .map((s) => s.day)
    .slice(-INTERVAL_SURVEYS);
  const gaps = days
    .slice(1)
    .map((d, i) => d - (days[i] as Day))
    .filter((gap) => gap > 0);
  return gaps.length === 0 ? null : median(gaps);
}

export const graceDays = (context: Context, intervalDays: number): number =>
  Math.min(context.policy['8.grace.share'] * intervalDays, context.policy['8.grace.days']);

export function inService(machine: Machine, day: Day): boolean {
  const row = machineRow(machine, day);
  return (row.inServiceFrom === null || row.inServiceFrom <= day) && (row.removedOn === null || day < row.removedOn);
}

export function inScope(machine: Machine, survey: Survey): boolean {
  const row = machineRow(machine, survey.day);
  const { scope } = survey;
  return (
    scope.all ||
    scope.machines.includes(machine.id) ||
    (row.area !== null && scope.areas.includes(row.area)) ||
    (row.route !== null && scope.routes.includes(row.route))
  );
}

/** Series that could carry a zone or class: known quantities, and own ones with a floor or limits. */
export function isAssessable(context: Context, track: Track): boolean {
  const { quantity } = track.series;
  if (quantity === 'velocity' || quantity === 'displacement' || quantity === 'acceleration') return true;
  const row = pointRow(track, dayAt(context, context.current));
  return floorFor(track.series, row, context.policy) !== null || (track.looks[context.current]?.limits.set ?? null) !== null;
}

/** [n, m]: of m points with anything to assess, n had all of it measured at the survey. */
export function measuredOf(context: Context, tracks: readonly Track[], survey: number): readonly [number, number] {
  const whole = new Map<string, boolean>();
  for (const track of tracks) {
    if (!isAssessable(context, track)) continue;
    whole.set(track.series.point, (whole.get(track.series.point) ?? true) && track.looks[survey] !== null);
  }
  let measured = 0;
  for (const all of whole.values()) if (all) measured += 1;
  return [measured, whole.size];
}

export const wasMeasured = (tracks: readonly Track[], survey: number): boolean =>
  tracks.some((t) => isMeasured(t.readings[survey] ?? null));

/** Last survey up to `survey` at which anything of the machine was measured; −1 where never. */
export function lastMeasured(tracks: readonly Track[], survey: number): number {
  for (let s = survey; s >= 0; s -= 1) if (wasMeasured(tracks, s)) return s;
  return -1;
}

/** The commonest status among the machine's points that were not measured; `missing` where nothing was written down. */
export function whyNot(tracks: readonly Track[], survey: number): Status | null {
  const counts = new Map<Status, number>();
  for (const track of tracks) {
    const reading: Reading | null = track.readings[survey] ?? null;
    if (isMeasured(reading)) continue;
    const status: Status = reading === null || reading.status === 'measured' ? 'missing' : reading.status;
    counts.set(status, (counts.get(status) ?? 0) + 1);
  }
  let found: Status | null = null;
  for (const [status, count] of counts) {
    if (found === null || count > (counts.get(found) as number) || (count === counts.get(found) && found === 'missing')) found = status;
  }
  return found;
}

/** A stopped spare is excused while its twin ran and was measured; `not due` excuses itself. */
function isExcused(context: Context, machine: Machine, survey: number): boolean {
  const why = whyNot(context.byMachine.get(machine.id) ?? [], survey);
  if (why === 'not due') return true;
  if (why !== 'stopped') return false;
  return twinsOf(context, machine, survey).some((twin) => wasMeasured(context.byMachine.get(twin.id) ?? [], survey));
}

/** Other machines of the spare group on the survey's day. */
export function twinsOf(context: Context, machine: Machine, survey: number): Machine[] {
  const day = dayAt(context, survey);
  const group = machineRow(machine, day).spareGroup;
  if (group === null) return [];
  return context.plant.machines.filter((m) => m !== machine && machineRow(m, day).spareGroup === group && inService(m, day));
}

/** Due at a survey by its interval: not measured since then for the interval less the grace. A machine never measured is due. */
function isDue(context: Context, machine: Machine, survey: number): boolean {
  const interval = intervalOf(context, machine);
  const last = lastMeasured(context.byMachine.get(machine.id) ?? [], survey - 1);
  if (interval === null || last < 0) return true;
  return dayAt(context, survey) - dayAt(context, last) >= interval - graceDays(context, interval);
}

/** Surveys in a row, the current the last, at which the machine was in scope, due, not excused and not measured. */
export function missesInARow(context: Context, machine: Machine): number {
  const tracks = context.byMachine.get(machine.id) ?? [];
  let misses = 0;
  for (let s = context.current; s >= 0; s -= 1) {
    if (wasMeasured(tracks, s)) break;
    const survey = context.plant.surveys[s] as Survey;
    if (!inService(machine, survey.day)) break;
    if (inScope(machine, survey) && isDue(context, machine, s) && !isExcused(context, machine, s)) misses += 1;
  }
  return misses;
}

function statusOf(line: {
  readonly measured: number;
  readonly of: number;
  readonly inScope: boolean;
  readonly due: boolean;
  readonly any: boolean;
  readonly excused: boolean;
}): CoverageLine['status'] {
  if (line.any) return line.measured === line.of ? 'measured' : 'partly measured';
  if (!line.inScope) return 'out of scope';
  if (line.excused) return 'excused';
  return line.due ? 'not measured' : 'not due';
}

/** One line for each machine in service at the survey. */
export function coverageLines(context: Context): CoverageLine[] {
  const survey = context.plant.surveys[context.current] as Survey;
  return context.plant.machines.filter((m) => inService(m, survey.day)).map((machine) => coverageLine(context, machine, survey));
}

function coverageLine(context: Context, machine: Machine, survey: Survey): CoverageLine {
  const tracks = context.byMachine.get(machine.id) ?? [];
  const [measured, of] = measuredOf(context, tracks, context.current);
  const interval = intervalOf(context, machine);
  const last = lastMeasured(tracks, context.current);
  const due = isDue(context, machine, context.current);
  const scoped = inScope(machine, survey);
  const any = wasMeasured(tracks, context.current);
  return {
    machine: machine.id,
    due,
    in_scope: scoped,
    measured,
    of,
    status: statusOf({ measured, of, inScope: scoped, due, any, excused: !any && isExcused(context, machine, context.current) }),
    why: any && measured === of ? null : whyNot(tracks, context.current),
    misses_in_a_row: missesInARow(context, machine),
    last_measured: last < 0 ? null : dayText(dayAt(context, last)),
    next_due: last < 0 || interval === null ? null : dayText(dayAt(context, last) + Math.round(interval)),
    interval_days: interval,
  };
}
