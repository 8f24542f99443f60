import { Command, CommanderError } from 'commander';
import { OverbrimError } from '../core/index.ts';
import { builtInProcesses, TerrainShelf } from '../engine/index.ts';
import { type Process, software } from '../host/index.ts';
import { caution, type TerrainStore } from '../processes/index.ts';
import { descriptionText } from './description-text.ts';
import { exitCodes } from './exit-codes.ts';
import { addProcessOptions, type GivenOptions, inputsOf, shielded } from './process-options.ts';
import { reachFiles } from './reach-files.ts';
import { type RunReport, runProcess } from './run-process.ts';
import type { Terminal } from './terminal.ts';

/** Errors that the person at the keyboard mends by other options. */
const wrongUse = new Set(['bad-input', 'unit-missing', 'no-outlet']);

/** The command line; returns the exit code and throws nothing. */
export async function main(args: readonly string[], terminal: Terminal): Promise<number> {
  const asJson = args.includes('--json');
  const program = new Command('overbrim')
    .description(
      'Says from a terrain elevation model where water will stand, how much, where it overflows and which way it runs.',
    )
    .version(software.version, '--version', 'print the version')
    .helpOption('--help', 'print this help')
    .helpCommand(false)
    .addHelpText('after', `\n${caution}`)
    .exitOverride()
    .configureOutput({
      writeOut: (text) => terminal.stdout.write(text),
      writeErr: () => {},
    });
  const registry = builtInProcesses();
  program
    .command('list')
    .description('list the processes')
    .option('--json', 'as JSON')
    .action(() => list(registry.list(), asJson, terminal));
  program
    .command('describe')
    .description('describe a process, as OGC API – Processes JSON')
    .argument('<process>', 'its id')
    .option('--text', 'for reading')
    .option('--json', 'as JSON, as without options')
    .action((id: string, { text }: { text?: boolean }) => {
      const { description } = registry.get(id);
      terminal.stdout.write(
        text === true ? descriptionText(description) : `${JSON.stringify(description, null, 2)}\n`,
      );
    });
  const run = program
    .command('run')
    .description('run a process and write its results into a folder')
    .action(() => {
      throw new OverbrimError(
        'bad-input',
        `No process was named; expected run ${registry
          .list()
          .map(({ description }) => description.id)
          .join(' or ')}.`,
      );
    });
  for (const process of registry.list()) {
    const command = run.command(process.description.id).description(process.description.title);
    addProcessOptions(command, process.description);
    command
      .requiredOption('--out <folder>', 'folder for the results')
      .option('--json', 'report as one JSON document on standard output, without progress')
      .action(async (options: GivenOptions & { out: string }) => {
        const inputs = inputsOf(process.description, options);
        const shelf = new TerrainShelf(reachFiles);
        const report = await runProcess(process, inputs, options.out, shelf, terminal, { quiet: asJson });
        terminal.stdout.write(
          asJson ? `${JSON.stringify({ ...report, caution }, null, 2)}\n` : reportText(report),
        );
      });
  }
  try {
    if (args.length === 0) program.help();
    if (args[0] === 'run' && args.length > 1 && !args[1].startsWith('-')) registry.get(args[1]);
    await program.parseAsync(args.map(shielded), { from: 'user' });
    return exitCodes.done;
  } catch (error) {
    return explain(error, asJson, terminal);
  }
}

function list(processes: readonly Process<TerrainStore>[], asJson: boolean, terminal: Terminal): void {
  const entries = processes.map(({ description: { id, version, title } }) => ({ id, version, title }));
  if (asJson) {
    terminal.stdout.write(`${JSON.stringify(entries, null, 2)}\n`);
    return;
  }
  const wide = Math.max(...entries.map(({ id }) => id.length));
  for (const { id, title } of entries) terminal.stdout.write(`${id.padEnd(wide)}  ${title}\n`);
}

function reportText({ folder, files, notes, values }: RunReport): string {
  const lines = [`Results are in ${folder}`];
  for (const { file, bytes } of files) lines.push(`  ${file.padEnd(24)} ${sizeText(bytes).padStart(10)}`);
  const { summary } = values;
  if (typeof summary === 'object' && summary !== null) {
    lines.push('');
    for (const [name, value] of Object.entries(summary))
      lines.push(`  ${name.padEnd(24)} ${String(value).padStart(16)}`);
  }
  if (notes.length > 0) lines.push('', ...notes.map((note) => `Note: ${note}`));
  lines.push('', caution, '');
  return lines.join('\n');
}

function sizeText(bytes: number): string {
  if (bytes < 10_000) return `${bytes} B`;
  return bytes < 10_000_000 ? `${(bytes / 1000).toFixed(0)} kB` : `${(bytes / 1e6).toFixed(1)} MB`;
}

/** Says what went wrong on standard error and gives the exit code. */
function explain(error: unknown, asJson: boolean, terminal: Terminal): number {
  if (error instanceof CommanderError) {
    if (error.exitCode === 0 || error.code === 'commander.help') return exitCodes.done;
    const found = error.message
      .replace(/^error: /, '')
      .replace('\n(Did', ' (did')
      .replace('. Expected', '; expected');
    const message = `${found.replace(/\.$/, '')}; see overbrim --help or overbrim run <process> --help.`;
    return say('bad-input', message, exitCodes.wrongUse);
  }
  if (error instanceof OverbrimError) {
    const code =
      error.code === 'cancelled'
        ? exitCodes.interrupted
        : wrongUse.has(error.code)
          ? exitCodes.wrongUse
          : exitCodes.failed;
    return say(error.code, error.message, code);
  }
  if (error instanceof RangeError && /allocation|array (buffer|length)/i.test(error.message)) {
    return say(
      'out-of-memory',
      `There is not enough memory (${error.message}); choose a smaller extent (--extent) or fewer files.`,
      exitCodes.failed,
    );
  }
  const what = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return say('failed', `This is a fault of the program, please report it: ${what}`, exitCodes.failed);

  function say(code: string, message: string, exit: number): number {
    terminal.stderr.write(asJson ? `${JSON.stringify({ code, message })}\n` : `overbrim: ${message}\n`);
    return exit;
  }
}
