/**
 * What a command is. In: arguments that yargs has checked, a Shell. Out: an exit code. Never: process, disk or clock by itself,
 * nor a heavy stage loaded before it is needed (`check` must not wait for the PDF library).
 */
import type { Shell } from '../shell/types.ts';

/** 0 done, 1 the input has errors, 2 wrong usage, 3 a bug. */
export type ExitCode = 0 | 1 | 2 | 3;

export interface Argument {
  readonly describe: string;
  readonly type: 'string' | 'boolean';
  readonly default?: boolean;
  readonly demandOption?: boolean;
  /** A list: the positional stands as `<name..>`. */
  readonly array?: boolean;
}

/** Every argument of every command; which of them may stand is each command's own table. */
export interface Arguments {
  readonly folder?: string | undefined;
  readonly plant?: string | undefined;
  readonly record?: string | undefined;
  readonly issued?: readonly string[] | undefined;
  readonly records?: readonly string[] | undefined;
  readonly csv?: boolean | undefined;
  readonly id?: string | undefined;
  readonly survey?: string | undefined;
  readonly from?: readonly string[] | undefined;
  readonly reason?: string | undefined;
  readonly sign?: string | undefined;
  readonly key?: string | undefined;
  readonly out?: string | undefined;
  readonly machine?: string | undefined;
  readonly brief?: boolean | undefined;
  readonly 'single-file'?: boolean | undefined;
  readonly tags?: boolean | undefined;
  readonly json?: boolean | undefined;
  readonly quiet?: boolean | undefined;
}

export interface Command {
  /** As yargs reads it, e.g. `check <plant>`. */
  readonly usage: string;
  readonly describe: string;
  readonly positionals: Readonly<Record<string, Argument>>;
  readonly options: Readonly<Record<string, Argument>>;
  readonly run: (given: Arguments, context: Context) => Promise<ExitCode>;
}

export interface Context {
  readonly shell: Shell;
  /** Of the package. */
  readonly version: string;
}

export const plantArgument: Argument = { describe: 'the plant folder', type: 'string' };
export const jsonOption: Argument = { describe: 'print the result as JSON', type: 'boolean' };
