/** An auditor's first questions, answered from the Comparison alone. In: a Comparison. Out: a question, its answer, and the chapter that shows it. */
import type { Comparison } from '../record/comparison.ts';

interface Answer {
  readonly question: string;
  readonly answer: string;
  readonly id: string;
}

const few = (items: readonly string[], most = 12): string =>
  items.length <= most ? items.join('; ') : `${items.slice(0, most).join('; ')} and ${items.length - most} more`;
const listed = (none: string, items: readonly string[]): string => (items.length === 0 ? none : `${items.length}: ${few(items)}.`);

export function answersOf(c: Comparison): Answer[] {
  const critical = c.coverage.filter((m) => m.criticality === 'critical');
  const missed = critical.filter((m) => m.quarters_missed.length > 0).map((m) => `${m.machine} not in ${few(m.quarters_missed, 6)}`);
  const proof = c.actions.filter((a) => a.flags.some((flag) => flag.startsWith('closed')));
  const open = c.actions.filter((a) => a.flags.some((flag) => flag.includes('never closed')));
  return [
    {
      question: 'Was any old figure altered?',
      id: 'restated',
      answer: listed(
        'No past reading differs between these records.',
        c.restated.map((r) => `${r.machine} ${r.point} at ${r.survey}: ${r.before ?? 'none'}, later ${r.after ?? 'none'}`),
      ),
    },
    {
      question: 'Which verdicts depend on what changed?',
      id: 'differing',
      answer: listed(
        'None.',
        c.verdicts.filter((v) => v.why !== null).map((v) => `${v.machine} at ${v.survey}: ${v.issued}, today ${v.today}`),
      ),
    },
    {
      question: 'Was every critical machine measured each quarter?',
      id: 'coverage',
      answer:
        critical.length === 0
          ? 'No machine is stated as critical.'
          : missed.length === 0
            ? `Yes, all ${critical.length}.`
            : `No. ${few(missed)}.`,
    },
    {
      question: 'Which actions were closed without proof?',
      id: 'actions',
      answer: listed(
        'None.',
        proof.map((a) => `${a.action}, ${a.flags.find((flag) => flag.startsWith('closed'))}`),
      ),
    },
    {
      question: 'Which actions were never closed?',
      id: 'actions',
      answer: listed(
        'None.',
        open.map((a) => `${a.action}, ${a.days_open} days`),
      ),
    },
    {
      question: 'Which readings were taken past a calibration or qualification?',
      id: 'past-due',
      answer: listed(
        'None.',
        c.past_due.map((p) => `${p.of} (${p.kind}) at ${p.survey}, ${p.readings} readings`),
      ),
    },
  ];
}
