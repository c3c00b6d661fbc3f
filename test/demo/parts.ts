/**
 * What machines of the demo plant are put together from. In: levels at bearings. Out: components and series.
 * Never: a story; those stand with the machines.
 */
import type { DemoSeries, Row, Told } from './types.ts';

const HOUSING = { measured_on: 'bearing housing', low_hz: 10, high_hz: 1000 };
const DIRECTIONS: Readonly<Record<string, string>> = { H: 'horizontal', V: 'vertical', A: 'axial' };

type Level = number | readonly Told[];

/** Velocity, mm/s r.m.s., at a bearing. */
export const v = (component: string, point: string, level: Level, more: Partial<DemoSeries> = {}): DemoSeries => ({
  ...more,
  ...(component === '' ? {} : { component }),
  point,
  columns: { ...HOUSING, location: `bearing ${point.slice(0, -1)}`, direction: DIRECTIONS[point.slice(-1)] ?? 'radial', ...more.columns },
  ...(typeof level === 'number' ? { level } : { values: level }),
});

/** Acceleration, r.m.s. up to 10 kHz, at a bearing. */
export const a = (component: string, point: string, level: Level, unit = 'm/s²', detection = 'rms'): DemoSeries => ({
  ...v(component, point, level, { columns: { high_hz: 10000 } }),
  quantity: 'acceleration',
  unit,
  detection,
});

/** Horizontal and vertical at bearing `n`, and axial where asked. Quiet bearings: vertical 0.8, axial 0.42 of the horizontal. */
export function bearing(component: string, n: number, level: number, axial = false): DemoSeries[] {
  const part = (share: number): number => Math.round(level * share * 100) / 100;
  return [v(component, `${n}H`, level), v(component, `${n}V`, part(0.8)), ...(axial ? [v(component, `${n}A`, part(0.42))] : [])];
}

/** Two bearings of a component, the second with an axial point. */
export const pair = (component: string, first: number, low: number, high: number): DemoSeries[] => [
  ...bearing(component, first, low),
  ...bearing(component, first + 1, high, true),
];

/** The same series but for those given, found by point and quantity. */
export const withSeries = (series: readonly DemoSeries[], ...others: readonly DemoSeries[]): DemoSeries[] => {
  const key = (s: DemoSeries): string => `${s.point} ${s.quantity ?? 'velocity'}`;
  const known = new Set(series.map(key));
  return [...series.map((s) => others.find((o) => key(o) === key(s)) ?? s), ...others.filter((o) => !known.has(key(o)))];
};

export const takenWith = (series: readonly DemoSeries[], taken: (survey: number) => Row): DemoSeries[] =>
  series.map((s) => ({ ...s, taken: (n: number) => ({ ...taken(n), ...s.taken?.(n) }) }));

/** Velocity with the displacement (µm r.m.s.) and acceleration (m/s² r.m.s.) that one sinusoid of `hz` has: d = v/2πf, a = 2πf v, one band. */
export function oneFrequency(
  component: string,
  point: string,
  velocity: readonly number[],
  hz: number,
  more: Partial<DemoSeries> = {},
): DemoSeries[] {
  const w = 2 * Math.PI * hz;
  const base = v(component, point, velocity, more);
  return [
    base,
    {
      ...v(
        component,
        point,
        velocity.map((x) => (1000 * x) / w),
      ),
      quantity: 'displacement',
      unit: 'µm',
    },
    {
      ...v(
        component,
        point,
        velocity.map((x) => (x * w) / 1000),
      ),
      quantity: 'acceleration',
      unit: 'm/s²',
    },
  ];
}

type Component = Row & { readonly component: string };
const base = (component: string, kind: string, kw: number, rpm: number): Component => ({
  component,
  kind,
  power_kw: kw,
  speed_rpm: rpm,
  drive: 'fixed',
  support: 'rigid',
  bearings: 'rolling',
  orientation: 'horizontal',
});
export const motor = (kw: number, shaftHeight: number, rpm: number, more: Row = {}): Component => ({
  ...base('motor', 'motor', kw, rpm),
  shaft_height_mm: shaftHeight,
  ...more,
});
export const pump = (kw: number, rpm: number, category: string, more: Row = {}): Component => ({
  ...base('pump', 'pump', kw, rpm),
  pump_category: category,
  ...more,
});
export const fan = (kw: number, rpm: number, more: Row = {}): Component => ({ ...base('fan', 'fan', kw, rpm), ...more });
export const part = (component: string, kind: string, kw: number, rpm: number, more: Row = {}): Component => ({
  ...base(component, kind, kw, rpm),
  ...more,
});

export const about = (name: string, area: string, route: string, criticality: string, more: Row = {}): Row => ({
  name,
  area,
  route,
  criticality,
  interval_days: 60,
  ...more,
});
