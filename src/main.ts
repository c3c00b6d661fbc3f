#!/usr/bin/env node
/**
 * The program. In: the command line. Out: an exit code. Errors are caught here, once: what the user can mend is told in a line with
 * its hint, everything else is a bug. Each command loads its own stages when it runs.
 */
import process from 'node:process';
import yargs, { type Argv } from 'yargs';
import { check } from './commands/check.ts';
import type { Argument, Arguments, Command, Context, ExitCode } from './commands/command.ts';
import { compare } from './commands/compare.ts';
import { draft } from './commands/draft.ts';
import { issue } from './commands/issue.ts';
import { limits } from './commands/limits.ts';
import { newCommand } from './commands/new.ts';
import { printable } from './commands/problems.ts';
import { render } from './commands/render.ts';
import { report } from './commands/report.ts';
import { packageVersion } from './shell/package.ts';
import { verify } from './commands/verify.ts';
import { realShell } from './shell/shell.ts';
import { UserError } from './shell/types.ts';

const COMMANDS: readonly Command[] = [newCommand, check, draft, report, issue, verify, compare, render, limits];

async function run(words: readonly string[], context: Context): Promise<ExitCode> {
  let code: ExitCode = 0;
  const parser = yargs([...words])
    .scriptName('swayfolio')
    .usage('$0 <command>\n\nA static report generator for periodic vibration surveys.')
    .locale('en')
    .version(context.version)
    .strict()
    .demandCommand(1, 'A command is missing.')
    .recommendCommands()
    .exitProcess(false)
    .showHelpOnFail(false)
    .fail((message, error) => {
      throw error ?? new UserError(message, 'swayfolio --help lists the commands, swayfolio <command> --help its options.', 2);
    });
  for (const command of COMMANDS) {
    parser.command(
      command.usage,
      command.describe,
      (options) => declare(options, command),
      async (given) => {
        const known = Object.entries({ ...command.positionals, ...command.options })
          .filter(([, argument]) => argument.array !== true)
          .map(([name]) => name);
        code = await command.run(oneValueEach(given, known), context);
      },
    );
  }
  await parser.parseAsync();
  return code;
}

function declare(parser: Argv, command: Command): Argv {
  const required = (name: string): boolean => command.usage.includes(`<${name}>`) || command.usage.includes(`<${name}..>`);
  for (const [name, argument] of Object.entries(command.positionals))
    parser.positional(name, { ...argument, demandOption: required(name) });
  return parser.options(command.options as { readonly [name: string]: Argument });
}

/** yargs makes a list of an option given twice, and an empty text of one given without its value. */
function oneValueEach(given: Readonly<Record<string, unknown>>, known: readonly string[]): Arguments {
  for (const name of known) {
    const value = given[name];
    if (Array.isArray(value)) throw new UserError(`--${name} is given twice.`, 'Give it once.', 2);
    if (value === '') throw new UserError(`--${name} has no value.`, null, 2);
  }
  return given;
}

function tell(error: unknown): ExitCode {
  if (error instanceof UserError) {
    realShell.stderr(`swayfolio: ${printable(error.message)}\n${error.hint === null ? '' : `  hint: ${printable(error.hint)}\n`}`);
    return error.exitCode;
  }
  realShell.stderr(
    `swayfolio ${packageVersion()}: this is a bug of the program, not of your data; nothing was replaced.\n${error instanceof Error ? error.stack : String(error)}\n`,
  );
  return 3;
}

// A reader that has seen enough (`| head`) is no error.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});

try {
  process.exitCode = await run(process.argv.slice(2), { shell: realShell, version: packageVersion() });
} catch (error) {
  process.exitCode = tell(error);
}
