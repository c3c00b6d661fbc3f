/**
 * A drawing: closed list of shapes in points (1/72 in), y downwards, origin top left. Made once, written as SVG or as
 * PDF operators. Inks are names of the brand's palette, never colours, so that site (light and dark) and PDF agree.
 */
export type Ink =
  | 'ink'
  | 'quiet'
  | 'rule'
  | 'paper'
  | 'teal'
  | 'zone-a'
  | 'zone-b'
  | 'zone-c'
  | 'zone-d'
  | 'band-a'
  | 'band-b'
  | 'band-c'
  | 'band-d';

export interface PathShape {
  readonly kind: 'path';
  /** Absolute M, L, C and Z commands only. */
  readonly d: string;
  readonly fill: Ink | null;
  readonly stroke: Ink | null;
  readonly strokeWidth: number;
  /** Lengths of dash and gap; empty = solid. */
  readonly dash: readonly number[];
  /** Centre and radius where the path is a circle: SVG has a shorter way to say so. */
  readonly circle?: readonly [cx: number, cy: number, r: number];
}

export interface TextShape {
  readonly kind: 'text';
  readonly x: number;
  /** Baseline. */
  readonly y: number;
  readonly text: string;
  readonly size: number;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly fill: Ink;
  readonly bold: boolean;
}

export type Shape = PathShape | TextShape;

export interface Drawing {
  readonly width: number;
  readonly height: number;
  /** What it shows, in words: the figure's alternative text. */
  readonly alt: string;
  readonly shapes: readonly Shape[];
}
