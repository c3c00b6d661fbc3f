/** Verdicts on the terminal. In: what verify found. Out: lines, a block an issue. Never: a difference left out. */
import { type Difference, differenceText } from '../archive/difference.ts';
import type { Reproduction, Verdict } from '../archive/verify.ts';
import { printable } from './problems.ts';

const CHAIN: Readonly<Record<Verdict['chain'], string>> = {
  first: 'the first of its archive',
  linked: 'names the issue before it, which is at hand',
  'not at hand': 'names an issue before it that is not at hand here',
  broken: 'BROKEN: the issue before it is missing or changed, or two name the same one',
};

export function verdictLines(verdicts: readonly Verdict[], strangers: readonly string[], isSound: boolean): string {
  const lines = verdicts.flatMap(linesOf);
  for (const stranger of strangers) lines.push(`${stranger}: ADDED, no issue of swayfolio`);
  const bad = verdicts.filter((verdict) => !verdict.isSound).length;
  const strange = strangers.length === 0 ? '' : `; ${strangers.length} beside them ${strangers.length === 1 ? 'is' : 'are'} no issue`;
  lines.push(
    isSound
      ? `${verdicts.length} of ${verdicts.length} as issued.`
      : `${verdicts.length - bad} of ${verdicts.length} as issued, ${bad} with differences${strange}.`,
  );
  return lines.map((line) => `${printable(line)}\n`).join('');
}

function linesOf(verdict: Verdict): string[] {
  const { issue, alterations } = verdict;
  return [
    `${verdict.folder}: ${issue === null ? 'no issue.json that can be read' : `number ${issue.number}, revision ${issue.revision}, survey ${issue.survey}, issued ${issue.issued_on}`}`,
    `  files      ${alterations.length === 0 ? 'unaltered' : `${alterations.length} DIFFER`}`,
    ...alterations.map(({ path, kind, message }) => `    ${kind.toUpperCase()} ${path}: ${message}`),
    `  manifest   ${verdict.manifestHash ?? 'missing'}`,
    `  chain      ${CHAIN[verdict.chain]}`,
    `  signature  ${verdict.signature.state === 'bad' ? 'BAD: ' : ''}${verdict.signature.message}`,
    ...reproductionLines(verdict.reproduction),
  ];
}

function reproductionLines(reproduction: Reproduction): string[] {
  if (reproduction.result === 'not possible') return [`  record     NOT REPRODUCED: ${reproduction.because}`];
  const { versions, wording } = reproduction;
  const differences = reproduction.result === 'differs' ? reproduction.differences : [];
  return [
    `  record     ${differences.length === 0 ? 'reproduced from the frozen inputs' : `DIFFERS from what the frozen inputs give today, in ${differences.length} places`}`,
    ...differences.map((difference) => `    ${difference.kind}: ${today(difference)}`),
    ...versions.map((difference) => `    version: ${today(difference)}`),
    ...(wording.length === 0
      ? []
      : [`    wording alone, in ${wording.length} places`, ...wording.map((difference) => `      ${today(difference)}`)]),
  ];
}

const today = (difference: Difference): string => differenceText(difference, 'as issued');
