/**
 * Actions: what the analyst found, what the ledger carries, and a draft for each exception that has neither. In: assessed
 * machines, findings, ledger. Out: draft lines, not yet ranked. Never: an id that changes when others are added.
 */
import { type Day, dayText } from '../plant/day.ts';
import type { Finding, LedgerAction } from '../plant/types.ts';
import type { Override } from '../record/types.ts';
import type { Level } from './urgency-table.ts';
import { NO_LEVEL, weight } from './urgency-table.ts';
import type { Assessed } from './machine.ts';
import { byUrgency } from './machine.ts';
import type { Verdict } from './level.ts';
import { type Context, dayAt } from './track.ts';
import { type Verification, verify } from './verification.ts';

/** One action before it is ranked and written. */
export interface DraftAction {
  readonly id: string;
  readonly assessed: Assessed;
  readonly finding: Finding | null;
  readonly ledger: LedgerAction | null;
  /** Id of the survey whose text it still bears; null where it was written or confirmed at this one. */
  readonly carriedFrom: string | null;
  readonly raised: Day;
  readonly timesReported: number;
  /** The reading it is about: the most urgent it covers; null where none. */
  readonly verdict: Verdict | null;
  readonly computed: Level;
  readonly override: Override | null;
  readonly verification: Verification | null;
  readonly status: LedgerAction['status'];
  readonly origin: 'analyst' | 'ledger' | 'drafted';
}

/** The last version of each finding up to the current survey, with where and how often it was reported. */
export interface Reported {
  readonly finding: Finding;
  readonly firstSurvey: number;
  readonly lastSurvey: number;
  readonly times: number;
}

export function reportedFindings(context: Context): Map<string, Reported> {
  const found = new Map<string, Reported>();
  context.plant.surveys.forEach((survey, s) => {
    for (const finding of survey.findings) {
      const before = found.get(finding.id);
      found.set(finding.id, { finding, firstSurvey: before?.firstSurvey ?? s, lastSurvey: s, times: (before?.times ?? 0) + 1 });
    }
  });
  return found;
}

const covers = (item: { readonly component: string | null; readonly points: readonly string[] }, verdict: Verdict): boolean =>
  (item.component === null || item.component === verdict.track.component.id) &&
  (item.points.length === 0 || item.points.includes(verdict.track.series.point));

/** Component and points that an action speaks of; empty means all of the machine. */
function extentOf(finding: Finding | null, ledger: LedgerAction | null): { component: string | null; points: readonly string[] } {
  const points = finding?.points ?? [];
  return {
    component: finding?.component ?? null,
    points: points.length === 0 && finding === null && ledger?.verifyPoint ? [ledger.verifyPoint] : points,
  };
}

/** All draft actions of a machine. */
export function actionsOf(context: Context, assessed: Assessed, reported: ReadonlyMap<string, Reported>): DraftAction[] {
  const id = assessed.machine.id;
  const rows = context.plant.actions.filter((a) => a.machine === id);
  const ids = new Set([...rows.map((r) => r.id), ...[...reported.keys()].filter((finding) => isActionId(finding, id))]);
  const findings = [...reported.values()].filter((r) => r.finding.machine === id && r.finding.closed === null);
  const items: DraftAction[] = [];
  const joined = new Set<LedgerAction>();
  for (const report of findings) {
    const own = rows.filter((row) => row.finding === report.finding.id);
    for (const row of own) joined.add(row);
    const ledger = own[own.length - 1] ?? null;
    if (ledger?.status === 'done' && report.lastSurvey < context.current && verify(context, ledger)?.result === 'verified') continue;
    items.push(itemOf(context, assessed, report, ledger, ids));
  }
  for (const row of rows) if (!joined.has(row)) items.push(itemOf(context, assessed, null, row, ids));
  const kept = items.filter((item) => isLive(context, item));
  const draft = draftFor(context, assessed, kept, ids);
  return draft === null ? kept : [...kept, draft];
}

/** Done and verified actions live only at the survey that verified them; rejected ones while a reading still raises them. */
function isLive(context: Context, item: DraftAction): boolean {
  if (item.ledger === null || item.status === 'open' || item.status === 'ordered') return true;
  if (item.status === 'rejected') return item.computed.urgency !== null;
  const after = item.verification?.after ?? null;
  const survey = context.plant.surveys[context.current];
  if (item.verification?.result !== 'verified')
    return (
      item.verification !== null || item.ledger.closed === null || item.ledger.closed > dayAt(context, Math.max(0, context.current - 1))
    );
  return after !== null && survey !== undefined && after.date >= dayText(survey.from);
}

/** `<machine>/<date>/<n>`: a finding that was drafted bears the id of its action. */
const isActionId = (finding: string, machine: string): boolean => finding.startsWith(`${machine}/`);

function freshId(ids: Set<string>, machine: string, date: string): string {
  let n = 1;
  while (ids.has(`${machine}/${date}/${n}`)) n += 1;
  const id = `${machine}/${date}/${n}`;
  ids.add(id);
  return id;
}

function itemOf(context: Context, assessed: Assessed, report: Reported | null, ledger: LedgerAction | null, ids: Set<string>): DraftAction {
  const finding = report?.finding ?? null;
  const verification = ledger === null ? null : verify(context, ledger);
  const reopened = ledger?.status === 'done' && verification?.result === 'not verified';
  const settled = ledger?.status === 'done' && verification?.result === 'verified';
  const extent = extentOf(finding, ledger);
  const covered = assessed.verdicts.filter((v) => covers(extent, v)).sort(byUrgency(context));
  const verdict = covered[0] ?? null;
  const byMachine = assessed.urgencyBy === null ? assessed.computed : NO_LEVEL;
  const own = verdict?.level ?? NO_LEVEL;
  const computed = settled ? NO_LEVEL : weight(byMachine.urgency) > weight(own.urgency) ? byMachine : own;
  const first = report === null ? (ledger?.raised ?? dayAt(context, context.current)) : dayAt(context, report.firstSurvey);
  const isOverridden = finding !== null && finding.overrideBy !== null && finding.urgency !== null && assessed.override !== null;
  return {
    id:
      ledger?.id ??
      (finding !== null && isActionId(finding.id, assessed.machine.id) ? finding.id : freshId(ids, assessed.machine.id, dayText(first))),
    assessed,
    finding,
    ledger,
    carriedFrom:
      finding?.carriedFrom ??
      (report !== null && report.lastSurvey < context.current ? (context.plant.surveys[report.lastSurvey]?.id ?? null) : null),
    raised: ledger?.raised ?? first,
    timesReported: report?.times ?? timesSince(context, ledger?.raised ?? null),
    verdict,
    computed,
    override: isOverridden && !settled ? assessed.override : null,
    verification,
    status: reopened ? 'open' : (ledger?.status ?? 'open'),
    origin: finding !== null ? 'analyst' : 'ledger',
  };
}

const timesSince = (context: Context, raised: Day | null): number =>
  raised === null ? 1 : Math.max(1, context.plant.surveys.filter((s) => s.day >= raised).length);

/** A draft where the machine's level has neither finding nor action; never for accepted deviations, which have their own list. */
function draftFor(context: Context, assessed: Assessed, items: readonly DraftAction[], ids: Set<string>): DraftAction | null {
  if (assessed.urgency === null || assessed.computed.rule === 'K1') return null;
  const settled = (item: DraftAction): boolean => item.status === 'done' && item.verification?.result === 'verified';
  const by = assessed.urgencyBy;
  const covered = items.some((item) => !settled(item) && (by === null || covers(extentOf(item.finding, item.ledger), by)));
  if (covered) return null;
  const day = dayAt(context, context.current);
  return {
    id: freshId(ids, assessed.machine.id, dayText(day)),
    assessed,
    finding: null,
    ledger: null,
    carriedFrom: null,
    raised: day,
    timesReported: 1,
    verdict: by,
    computed: assessed.computed,
    override: null,
    verification: null,
    status: 'open',
    origin: 'drafted',
  };
}
