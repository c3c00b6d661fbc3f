/** Chart inputs from a record: what concerns a series is drawn in it, and nothing else. */
import { expect, it } from 'vitest';
import { Charts, seriesId } from '../../src/page/charts.ts';
import { folder, GROUPS, measurementOf } from '../assess/folder.ts';
import { formatOf, recordOfFiles } from '../site/plants.ts';

it('a new baseline of one quantity parts the lines of that quantity alone', () => {
  const series = [
    { point: 'P1', values: [1.0, 1.1, 1.0, 1.1] },
    { point: 'P1', values: [5.0, 5.1, 5.0, 5.1], quantity: 'acceleration', unit: 'm/s²' },
  ];
  const events = 'machine,quantity,date,event,new_baseline\nM,acceleration,2023-06-01,greasing,yes\n';
  const { record } = recordOfFiles(folder([{ machine: 'M', columns: { ...GROUPS.G2R }, series }], { 'events.csv': events }));
  const charts = new Charts(formatOf(record));
  const alt = (quantity: string): string => charts.drawing('history', seriesId(measurementOf(record, 'M', 'P1', quantity))).alt;
  expect(alt('acceleration')).toContain('broken where a new baseline begins');
  expect(alt('velocity')).not.toContain('new baseline');
});
