import type { Day } from '../plant/day.ts';
import type { Machine, Urgency } from '../plant/types.ts';
import { intervalOf, lastMeasured } from './coverage.ts';
import { type Context, dayAt, machineRow } from './track.ts';

/**
 * Day by which a level asks for its work: now the same day, 7 or 30 days after the reading, the next planned stop (else
 * 180 days), watch the next survey. null where watch has no interval to go by.
 */
export function dueOf(context: Context, machine: Machine, urgency: Urgency, readingDay: Day): Day | null {
  const { policy, plant, current } = context;
  const today = dayAt(context, current);
  if (urgency === 'now') return today;
  if (urgency === 'within a week') return readingDay + policy['9.due.week'];
  if (urgency === 'within a month') return readingDay + policy['9.due.month'];
  const row = machineRow(machine, today);
  if (urgency === 'next planned stop') {
    const stops = [row.nextStop, ...plant.settings.nextStops.filter((s) => s.area === null || s.area === row.area).map((s) => s.day)];
    const ahead = stops.filter((d): d is Day => d !== null && d >= today);
    return ahead.length === 0 ? today + policy['9.due.stop'] : Math.min(...ahead);
  }
  const interval = intervalOf(context, machine);
  const last = lastMeasured(context.byMachine.get(machine.id) ?? [], current);
  return interval === null || last < 0 ? null : dayAt(context, last) + Math.round(interval);
}
