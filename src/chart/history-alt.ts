/** What a history chart shows beyond its readings, in words: its lines, what stands hollow, gaps, the forecast. */
import { formatNumber, limitNumber } from '../words/numbers.ts';
import { listText, say } from '../words/say.ts';
import type { HistoryInput } from './series.ts';

export function historyAlt(input: HistoryInput, newBaselineAt: readonly number[]): string {
  const language = input.language ?? 'en';
  const named: readonly (readonly [string, number | null])[] = [
    ['A/B', input.ab],
    ['B/C', input.bc],
    ['C/D', input.cd],
    [say(language, 'chart.alarm'), input.alarm],
  ];
  const lines = named.flatMap(([name, value]) => (value === null ? [] : [`${name} ${limitNumber(language, value)}`]));
  if (input.baseline !== null) lines.push(`${say(language, 'chart.baseline')} ${formatNumber(language, input.baseline)}`);
  const hollow = input.values.filter((value, i) => value !== null && input.comparable[i] !== true).length;
  const parts = [input.alt];
  if (lines.length > 0) parts.push(say(language, 'chart.lines', { lines: listText(language, lines) }));
  if (hollow > 0) parts.push(say(language, 'chart.hollow', { n: hollow }));
  if (newBaselineAt.some((i) => i > 0)) parts.push(say(language, 'chart.gaps'));
  if (input.held) parts.push(say(language, 'chart.held'));
  const { forecast } = input;
  if (forecast !== null && forecast !== undefined)
    parts.push(say(language, forecast.latest === null ? 'chart.forecast_open' : 'chart.forecast', { ...forecast }));
  return parts.join(' ');
}
