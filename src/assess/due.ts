import type { Day } from '../plant/day.ts';
import type { Machine, Urgency } from '../plant/types.ts';
import { intervalOf, lastMeasured } from './coverage.ts';
import { type Context, dayAt, machineRow } from './track.ts';

/** The first planned stop on or after a day, of the machine, its area or the plant; null where none is planned. */
export function nextStopOf(context: Context, machine: Machine, day: Day): Day | null {
  const row = machineRow(machine, day);
  const stops = [row.nextStop, ...context.plant.settings.nextStops.filter((s) => s.area === null || s.area === row.area).map((s) => s.day)];
  const ahead = stops.filter((d): d is Day => d !== null && d >= day);
  return ahead.length === 0 ? null : Math.min(...ahead);
}

/**
 * Day by which a level asks for its work: now the same day, 7 or 30 days after the reading, the next planned stop (else
 * 180 days), watch the next survey. null where watch has no interval to go by.
 */
export function dueOf(context: Context, machine: Machine, urgency: Urgency, readingDay: Day): Day | null {
  const { policy, current } = context;
  const today = dayAt(context, current);
  if (urgency === 'now') return today;
  if (urgency === 'within a week') return readingDay + policy['9.due.week'];
  if (urgency === 'within a month') return readingDay + policy['9.due.month'];
  if (urgency === 'next planned stop') return nextStopOf(context, machine, today) ?? today + policy['9.due.stop'];
  const interval = intervalOf(context, machine);
  const last = lastMeasured(context.byMachine.get(machine.id) ?? [], current);
  return interval === null || last < 0 ? null : dayAt(context, last) + Math.round(interval);
}
