import { type Context, type Look, pointRow, type Track } from '../track.ts';
import { exceeds, reaches } from '../exceeds.ts';
import { median } from '../statistics/median.ts';
import { doubt, lastTime } from './doubt.ts';

/** Factors between units that are mistaken for one another: in ↔ mm, g ↔ m/s², m ↔ in, Hz ↔ CPM, powers of ten, and in/s peak ↔ mm/s r.m.s. */
const UNIT_FACTORS = [25.4, 9.80665, 39.3701, 60, 1000, 386.089, 9806.65, 25.4 / Math.SQRT2, 25.4 * Math.SQRT2];
/** Factors between detections of a sine: true ones are met too often by chance to be told on a few points. */
const DETECTION_FACTORS = [Math.SQRT2, 2, 2 * Math.SQRT2];

interface Suspect {
  readonly track: Track;
  readonly look: Look;
  readonly ratio: number;
}

type Scope = 'machine' | 'instrument' | 'file';

/** Marks readings of one survey whose ratio to last time is a factor between units (section 7, unit-factor). */
export function unitFactorDoubts(context: Context, survey: number): void {
  const suspects = suspectsAt(context, survey);
  const far = suspects.filter((s) => s.ratio > FAR || s.ratio < 1 / FAR);
  if (far.length === 0) return;
  if (far.length * 2 >= context.policy['7.unit.points'])
    for (const group of groupsOf(suspects, far)) judgeGroup(context, group.scope, group.name, group.members);
  for (const suspect of far) judgeAlone(context, suspect);
}

/** No factor, nor half of a group's members about one, lies nearer to 1 than this: √2 less 5 %, less the group's own 15 %. */
const FAR = 1.1;

interface Group {
  readonly scope: Scope;
  readonly name: string;
  readonly members: Suspect[];
}

const unitTyped = ({ look, track }: Suspect): string => look.reading.typedUnit ?? track.series.unit;

const scopesOf = ({ track, look }: Suspect): (readonly [Scope, string | null])[] => [
  ['machine', track.machine.id],
  ['instrument', look.reading.instrument],
  ['file', look.reading.place.file],
];

/** Readings of one unit on one machine, by one instrument, in one file; only where at least half of them are far from last time. */
function groupsOf(suspects: readonly Suspect[], far: readonly Suspect[]): Group[] {
  const tally = (list: readonly Suspect[]): Map<string, number> => {
    const counts = new Map<string, number>();
    for (const suspect of list)
      for (const [scope, name] of scopesOf(suspect))
        if (name !== null) counts.set(`${scope} ${name}`, (counts.get(`${scope} ${name}`) ?? 0) + 1);
    return counts;
  };
  const farIn = tally(far);
  const groups = new Map<string, Group>();
  for (const suspect of suspects) {
    for (const [scope, name] of scopesOf(suspect)) {
      if (name === null || (farIn.get(`${scope} ${name}`) ?? 0) < 2) continue;
      const key = `${scope}\u0000${name}\u0000${unitTyped(suspect)}`;
      const group = groups.get(key);
      if (group === undefined) groups.set(key, { scope, name, members: [suspect] });
      else group.members.push(suspect);
    }
  }
  return [...groups.values()].filter((g) => g.members.filter((m) => m.ratio > FAR || m.ratio < 1 / FAR).length * 2 >= g.members.length);
}

function suspectsAt(context: Context, survey: number): Suspect[] {
  const suspects: Suspect[] = [];
  for (const track of context.tracks) {
    const look = track.looks[survey];
    if (look === null || look === undefined || pointRow(track, look.reading.day).scale !== 'linear') continue;
    const before = lastTime(look);
    if (before !== null && before > 0 && look.value > 0) suspects.push({ track, look, ratio: look.value / before });
  }
  return suspects;
}

/** The factor (or its inverse) within `share` of a ratio, or null. */
function factorNear(ratio: number, factors: readonly number[], share: number): number | null {
  for (const factor of factors) {
    for (const candidate of [factor, 1 / factor]) if (!exceeds(Math.abs(ratio / candidate - 1), share)) return candidate;
  }
  return null;
}

function judgeGroup(context: Context, scope: Scope, name: string, members: readonly Suspect[]): void {
  const { policy } = context;
  if (members.length < policy['7.unit.points']) return;
  const middle = median(members.map((m) => m.ratio));
  const close = members.filter((m) => !exceeds(Math.abs(m.ratio / middle - 1), policy['7.unit.spread']));
  if (close.length < policy['7.unit.points'] || close.length * 2 < members.length) return;
  let factor = factorNear(middle, UNIT_FACTORS, policy['7.unit.match']);
  if (
    factor === null &&
    scope !== 'machine' &&
    close.length >= policy['7.unit.sine.points'] &&
    new Set(close.map((m) => m.track.machine.id)).size >= 2
  ) {
    factor = factorNear(middle, DETECTION_FACTORS, policy['7.unit.match']);
  }
  if (factor === null) return;
  for (const member of close) mark(context, member, factor, scope, name, close.length);
}

function judgeAlone(context: Context, suspect: Suspect): void {
  const { policy } = context;
  for (const factor of UNIT_FACTORS) {
    if (!reaches(factor, policy['7.unit.alone'])) continue;
    for (const candidate of [factor, 1 / factor]) {
      if (!exceeds(Math.abs(suspect.ratio / candidate - 1), policy['7.unit.history'])) {
        mark(context, suspect, candidate, 'point', suspect.track.series.point, 1);
        return;
      }
    }
  }
}

function mark(context: Context, suspect: Suspect, factor: number, scope: Scope | 'point', name: string, readings: number): void {
  const { look } = suspect;
  if (look.doubts.some((d) => d.kind === 'unit-factor')) return;
  const up = factor > 1;
  const facts = { ratio: suspect.ratio, factor: up ? factor : 1 / factor, scope, name, readings };
  look.doubts.push(doubt(context.plant.settings, 'unit-factor', up ? 're-measure' : 'held', facts, up ? '.high' : '.low'));
}
