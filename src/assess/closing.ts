import type { Day } from '../plant/day.ts';
import type { EventKind, LedgerAction } from '../plant/types.ts';
import type { Context, Track } from './track.ts';

const CLOSING: ReadonlySet<EventKind> = new Set(['repair', 'overhaul', 'balance', 'alignment', 'greasing', 'exchanged']);

/** What may explain a fall: the word of the event, or the id of the ledger action that was closed. */
export interface Closing {
  readonly what: string;
  readonly day: Day;
}

/** The last work on this series after `after` and not after `upTo`, by event or by a ledger action closed as done. */
export function closingBetween(context: Context, track: Track, after: Day, upTo: Day): Closing | null {
  let found: Closing | null = null;
  for (const event of track.events) {
    if (CLOSING.has(event.event) && event.day > after && event.day <= upTo) found = { what: event.event, day: event.day };
  }
  for (const action of context.closedActions.get(track.machine.id) ?? []) {
    if (action.closed !== null && action.closed > after && action.closed <= upTo && (found === null || action.closed > found.day)) {
      found = { what: action.id, day: action.closed };
    }
  }
  return found;
}

/** Ledger actions that were done, by machine. */
export function closedActions(actions: readonly LedgerAction[]): Map<string, LedgerAction[]> {
  const byMachine = new Map<string, LedgerAction[]>();
  for (const action of actions) {
    if (action.status !== 'done' || action.closed === null) continue;
    const list = byMachine.get(action.machine);
    if (list === undefined) byMachine.set(action.machine, [action]);
    else list.push(action);
  }
  return byMachine;
}
