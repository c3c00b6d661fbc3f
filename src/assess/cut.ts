import { dayText, type Day } from '../plant/day.ts';
import type { LedgerAction, Machine, Plant } from '../plant/types.ts';
import { UserError } from '../shell/types.ts';

/** A `closed` after the survey counts as open (record.md, decision 6). */
function asOf(action: LedgerAction, day: Day): LedgerAction {
  if (action.closed === null || action.closed <= day) return action;
  return { ...action, closed: null, closedBy: null, asFound: null, status: action.workOrder === null ? 'open' : 'ordered' };
}

/**
 * The plant as it was known at one survey: later surveys, events and ledger rows are left out.
 * `survey` null means the last one. Throws UserError for a survey that does not exist.
 */
export function cutAt(plant: Plant, survey: string | null): Plant {
  const index = survey === null ? plant.surveys.length - 1 : plant.surveys.findIndex((s) => s.id === survey);
  const current = plant.surveys[index];
  if (current === undefined) {
    const known = plant.surveys.map((s) => s.id).slice(-6);
    throw new UserError(
      `There is no survey "${survey ?? ''}".`,
      known.length === 0 ? 'The plant has no survey yet.' : `Surveys here: ${known.join(', ')}.`,
      2,
    );
  }
  const day = Math.max(current.day, current.to);
  const machines: Machine[] = plant.machines
    .map((m) => ({
      ...m,
      series: m.series.map((s) =>
        s.readings.some((r) => r.survey > index) ? { ...s, readings: s.readings.filter((r) => r.survey <= index) } : s,
      ),
    }))
    .filter((m) => m.declared || m.series.some((s) => s.readings.length > 0));
  return {
    ...plant,
    machines: index === plant.surveys.length - 1 ? plant.machines : machines,
    surveys: plant.surveys.slice(0, index + 1),
    events: plant.events.filter((e) => e.day <= day),
    actions: plant.actions.filter((a) => a.raised === null || a.raised <= day).map((a) => asOf(a, day)),
  };
}

/** `2026-01-14` of a day, null kept. */
export const dateOrNull = (day: Day | null): string | null => (day === null ? null : dayText(day));
