/** Dates later than today. In: a plant and today. Out: warnings. Only `check` asks: a report must not change with the clock. */
import { dayText, parseDay, type Day } from '../plant/day.ts';
import type { Place, Problem } from '../plant/problem.ts';
import type { Plant } from '../plant/types.ts';

/** `today` is `YYYY-MM-DD` by UTC. One day of grace: a crew east of Greenwich may be in tomorrow already. */
export function afterToday(plant: Plant, today: string): Problem[] {
  const last = (parseDay(today) ?? Number.POSITIVE_INFINITY) + 1;
  const late: Problem[] = [];
  const look = (what: string, day: Day | null, place: Place | null): void => {
    if (day === null || day <= last) return;
    const message = `${what} is dated ${dayText(day)}, later than today (${today}).`;
    late.push({
      code: 'date-after-today',
      severity: 'warning',
      file: place?.file ?? '',
      line: place?.line ?? null,
      column: null,
      message,
      hint: 'Check the year, and the order of day and month.',
    });
  };
  for (const survey of plant.surveys) {
    look(`Survey ${survey.id}`, survey.to, survey.place);
    for (const finding of survey.findings) {
      look(`The confirmation of finding ${finding.id}`, finding.confirmed, finding.place);
      look(`The closing of finding ${finding.id}`, finding.closed, finding.place);
    }
  }
  for (const machine of plant.machines) {
    for (const series of machine.series) {
      for (const reading of series.readings) {
        if (reading.takenAt !== null) look(`The reading of ${machine.id} ${series.point}`, reading.day, reading.place);
      }
    }
  }
  for (const event of plant.events) look(`The event at ${event.machine}`, event.day, event.place);
  for (const action of plant.actions) {
    look(`Action ${action.id}, raised,`, action.raised, action.place);
    look(`Action ${action.id}, closed,`, action.closed, action.place);
  }
  return late;
}
