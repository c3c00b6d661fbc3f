/** How a reading stands among those of its sisters at one survey. */
export interface Sisterhood {
  /** Sisters read, the machine itself among them. */
  readonly n: number;
  /** 1 = the highest. */
  readonly place: number;
  /** dB above the median of all. */
  readonly dbAboveMedian: number;
  readonly outlier: boolean;
}
