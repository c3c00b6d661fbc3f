/** Days of one round as one survey. In: surveys, how many days a round spans. Out: which survey each belongs to. Never: two surveys with folders of their own made one. */
import { dayText } from '../plant/day.ts';
import type { Survey } from '../plant/types.ts';
import { bareSurvey } from './settings.ts';

/** Joins, in place, the surveys of `heads` that lie within `span` days of the first; a survey with a folder keeps its name. Returns the new name by the old. */
export function joinDays(heads: Map<string, Survey>, folders: ReadonlySet<string>, span: number): Map<string, string> {
  const renamed = new Map<string, string>();
  const sorted = [...heads.values()].sort((a, b) => a.day - b.day || (a.id < b.id ? -1 : 1));
  let group: Survey[] = [];
  const close = (): void => {
    const [first] = group;
    const last = group[group.length - 1];
    if (first === undefined || last === undefined || group.length === 1) return;
    const home = group.find((s) => folders.has(s.id)) ?? null;
    const id = home?.id ?? dayText(last.day);
    for (const survey of group) {
      if (survey.id === id) continue;
      renamed.set(survey.id, id);
      heads.delete(survey.id);
    }
    heads.set(id, home ?? { ...bareSurvey(id, last.day), from: first.day, place: first.place });
  };
  for (const survey of sorted) {
    const [first] = group;
    const second = folders.has(survey.id) && group.some((s) => folders.has(s.id));
    if (first !== undefined && (survey.day - first.day >= span || second)) {
      close();
      group = [];
    }
    group.push(survey);
  }
  close();
  return renamed;
}
