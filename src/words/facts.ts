/** What a sentence is made from: plain values by name. Numbers are in the unit the name or a `unit` fact beside them says; dates are `YYYY-MM-DD`. */
export type Facts = { readonly [name: string]: string | number | boolean | null | readonly string[] | readonly number[] };
