import { mkdirSync, writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { machine, median, table } from './report.ts';
import { answers, type CoreModule, type Run, runOnce, stepNames } from './steps.ts';
import { type TerrainMaker, terrains } from './terrains.ts';
import { compiledTextbook, type Textbook } from './textbook.ts';

const options = {
  quick: { type: 'boolean', default: false },
  terrain: { type: 'string', multiple: true, default: Object.keys(terrains) },
  side: { type: 'string', multiple: true },
  runs: { type: 'string' },
} as const;

/** One terrain at one size; seconds are medians. */
interface Figures {
  readonly terrain: string;
  readonly cells: number;
  readonly leaves: number;
  readonly outermostPonds: number;
  readonly bytesPerCell: number;
  readonly secondsByStep: Readonly<Record<string, number>>;
  readonly textbookSeconds: number | null;
  /** Textbook's time over ours. */
  readonly timesTextbook: Readonly<Record<string, number | null>>;
}

/**
 * Measures the survey and what follows from it beside the textbook flood, in turns, prints a table and writes
 * `out/bench-survey.json`. @throws Error when our levels differ from the textbook's.
 */
export async function benchSurvey(core: CoreModule, given: string[]): Promise<void> {
  const { values } = parseArgs({ args: given, options });
  const sides = (values.side ?? (values.quick ? ['1000', '2000'] : ['1000', '2000', '4000'])).map(Number);
  const runs = Number(values.runs ?? (values.quick ? 3 : 5));
  const textbook = compiledTextbook();
  if (textbook === null) {
    console.log('No C++ compiler was found, so nothing is compared; install g++ or clang++ for the ratios.');
  }
  runOnce(core, await terrains.noisy(500), 500);
  const figures: Figures[] = [];
  try {
    for (const side of sides) {
      for (const name of values.terrain) {
        const make = terrains[name];
        if (make === undefined) {
          throw new Error(`There is no terrain "${name}"; choose from ${Object.keys(terrains).join(', ')}.`);
        }
        figures.push(await measured(core, textbook, name, make, side, runs));
        console.error(`${name}, ${side} × ${side}: done`);
      }
    }
  } finally {
    textbook?.remove();
  }
  const about = { ...machine(), compiler: textbook?.compiler ?? null, runs };
  mkdirSync('out', { recursive: true });
  writeFileSync('out/bench-survey.json', `${JSON.stringify({ about, figures }, null, 1)}\n`);
  console.log(
    Object.entries(about)
      .map(([what, value]) => `${what}: ${value}`)
      .join(' · '),
  );
  console.log(
    `Medians of ${runs}, seconds; × = times as fast as the textbook flood, which yields levels only.\n`,
  );
  console.log(shown(figures));
}

async function measured(
  core: CoreModule,
  textbook: Textbook | null,
  terrain: string,
  make: TerrainMaker,
  side: number,
  runs: number,
): Promise<Figures> {
  const elevationM = await make(side);
  textbook?.give(elevationM, side);
  const theirs: number[] = [];
  const ours: Run['seconds'][] = [];
  let last: Run | null = null;
  for (let run = 0; run < runs; run++) {
    if (textbook !== null) theirs.push(textbook.flood());
    last = runOnce(core, elevationM, side);
    ours.push(last.seconds);
  }
  if (last === null) throw new Error(`${runs} runs were asked for; expected at least 1.`);
  if (textbook !== null) refuseDifference(terrain, last.levelM, textbook.levels());
  const textbookSeconds = textbook === null ? null : median(theirs);
  const total = (steps: readonly (typeof stepNames)[number][]): number =>
    median(ours.map((seconds) => steps.reduce((sum, step) => sum + seconds[step], 0)));
  return {
    terrain,
    cells: elevationM.length,
    leaves: last.leaves,
    outermostPonds: last.outermostPonds,
    bytesPerCell: last.bytesPerCell,
    secondsByStep: Object.fromEntries(stepNames.map((step) => [step, total([step])])),
    textbookSeconds,
    timesTextbook: Object.fromEntries(
      Object.entries(answers).map(([answer, steps]) => [
        answer,
        textbookSeconds === null ? null : textbookSeconds / total(steps),
      ]),
    ),
  };
}

function refuseDifference(terrain: string, ours: Float32Array, textbook: Float32Array): void {
  const at = ours.findIndex((level, cell) => level !== textbook[cell]);
  if (at < 0) return;
  throw new Error(
    `${terrain}: the level of cell ${at} is ${ours[at]}, by the textbook it is ${textbook[at]}.`,
  );
}

function shown(figures: readonly Figures[]): string {
  const head = [
    'terrain',
    'M cells',
    'leaves %',
    'bytes/cell',
    'textbook',
    ...stepNames,
    ...Object.keys(answers).map((answer) => `× ${answer}`),
  ];
  const rows = figures.map((f) => [
    f.terrain,
    f.cells / 1e6,
    (100 * f.leaves) / f.cells,
    f.bytesPerCell,
    f.textbookSeconds ?? '–',
    ...stepNames.map((step) => f.secondsByStep[step]),
    ...Object.keys(answers).map((answer) => f.timesTextbook[answer] ?? '–'),
  ]);
  return table(head, rows);
}
