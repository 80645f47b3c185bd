/**
 * How fast a large file becomes a revision, against merely parsing it with the same library, in how much memory, and
 * how long at most the main thread could answer nothing else meanwhile.
 * `npm run bench:import [rows]`. Each side runs in a process of its own, by turns, and the best of the runs counts.
 */
import { spawnSync } from 'node:child_process';
import { createReadStream, createWriteStream, mkdtempSync, rmSync, statSync } from 'node:fs';
import { availableParallelism, loadavg, tmpdir } from 'node:os';
import { join } from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { parse } from 'csv-parse';
import { pino } from 'pino';
import { compose } from '../../service/src/compose';
import { readConfig } from '../../service/src/config';
import { migrationsFolder } from '../../service/src/database/migrations-folder';
import { migrate } from '../../service/src/database/migrator';
import { newId } from '../../service/src/database/new-id';

const goals = { ratio: 0.6, memoryMegabytes: 700 };
const runs = 2;
const stallResolutionMs = 5;
const columnCount = 30;
const hulls = ['steel', 'aluminium', 'oak', 'larch on oak', 'glass fibre', 'ferrocement'];

interface Measured {
  readonly seconds: number;
  readonly memoryMegabytes: number;
  readonly longestStallMs: number;
  readonly rows: number;
}

/** 24 measures with one to four decimals, four categories and two dates; park-miller numbers, so the same file each time. */
function* madeUpLines(rowCount: number): Generator<string> {
  let state = 20261201;
  const next = (): number => (state = (state * 48271) % 2147483647) / 2147483647;
  const two = (value: number): string => String(value).padStart(2, '0');
  const cell = (column: number): string => {
    if (column < 24) return (next() * 1000).toFixed(1 + (column % 4));
    if (column < 28) return hulls[Math.floor(next() * hulls.length)];
    return `202${Math.floor(next() * 6)}-${two(1 + Math.floor(next() * 12))}-${two(1 + Math.floor(next() * 28))}`;
  };
  yield `${Array.from({ length: columnCount }, (_, column) => (column < 24 ? `measure ${column} (m)` : `${column < 28 ? 'hull' : 'day'} ${column}`)).join(',')}\n`;
  for (let row = 0; row < rowCount; row += 500) {
    let text = '';
    for (let line = row; line < Math.min(rowCount, row + 500); line++)
      text += `${Array.from({ length: columnCount }, (_, column) => cell(column)).join(',')}\n`;
    yield text;
  }
}

async function merelyParse(path: string): Promise<number> {
  let rows = -1;
  const parser = parse();
  parser.on('data', () => rows++);
  await pipeline(createReadStream(path), parser);
  return rows;
}

interface Side {
  readonly work: () => Promise<number>;
  /** Takes away what the bench made; no part of what is measured. */
  readonly clear: () => Promise<void>;
}

async function bringIn(path: string): Promise<Side> {
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-bench-'));
  const config = readConfig({ DATA_DIR: folder, DEMO: 'off' });
  const services = compose({
    config,
    log: pino({ level: 'silent' }),
    sessionCleanupMs: 0,
  });
  await migrate(services.knex, migrationsFolder);
  const person = {
    id: newId(),
    name: 'Bench',
    email: 'bench@desk.example',
    roles: ['analyst'],
    state: 'active',
    partnerId: null,
    passwordHash: null,
    createdAt: new Date().toISOString(),
  } as const;
  await services.people.insert(person);
  const work = async (): Promise<number> => {
    const set = await services.records.importFile({
      path,
      fileName: 'bench.csv',
      name: 'Bench',
      description: '',
      personId: person.id,
    });
    const kinds = set.revision.columns.map((column) => column.kind).join(' ');
    if (!/^(numeric ){24}(category ){4}date date$/.test(kinds)) throw new Error(`The columns were read as ${kinds}.`);
    return set.revision.rowCount;
  };
  const clear = async (): Promise<void> => {
    await services.close();
    rmSync(folder, { recursive: true });
  };
  return { work, clear };
}

async function measure(side: string, path: string): Promise<Measured> {
  const { work, clear } =
    side === 'parse' ? { work: () => merelyParse(path), clear: async () => undefined } : await bringIn(path);
  // What it measures includes the interval between two of its looks.
  const delays = monitorEventLoopDelay({ resolution: stallResolutionMs });
  delays.enable();
  const begun = process.hrtime.bigint();
  const rows = await work();
  const seconds = Number(process.hrtime.bigint() - begun) / 1e9;
  delays.disable();
  const longestStallMs = Math.max(0, delays.max / 1e6 - stallResolutionMs);
  const memoryMegabytes = process.resourceUsage().maxRSS / 1024;
  await clear();
  return { seconds, rows, longestStallMs, memoryMegabytes };
}

function inOwnProcess(side: 'parse' | 'import', path: string): Measured {
  const child = spawnSync(process.execPath, [__filename, side, path], {
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  if (child.status !== 0) throw new Error(`The ${side} run failed.`);
  return JSON.parse(child.stdout) as Measured;
}

const best = (measured: readonly Measured[]): Measured => measured.reduce((a, b) => (b.seconds < a.seconds ? b : a));

async function compare(rowCount: number): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-bench-'));
  const path = join(folder, 'bench.csv');
  await pipeline(Readable.from(madeUpLines(rowCount)), createWriteStream(path));
  console.log(`${availableParallelism()} processors, load ${loadavg()[0].toFixed(1)}`);
  console.log(`${rowCount} rows × ${columnCount} columns, ${(statSync(path).size / 1e6).toFixed(0)} MB`);
  const parsed: Measured[] = [];
  const imported: Measured[] = [];
  for (let run = 0; run < runs; run++) {
    parsed.push(inOwnProcess('parse', path));
    imported.push(inOwnProcess('import', path));
  }
  rmSync(folder, { recursive: true });
  const [parse, bring] = [best(parsed), best(imported)];
  const memory = Math.max(...imported.map((run) => run.memoryMegabytes));
  if (bring.rows !== rowCount || parse.rows !== rowCount)
    throw new Error(`${bring.rows} and ${parse.rows} rows came out.`);
  const stall = Math.max(...imported.map((run) => run.longestStallMs));
  const ratio = parse.seconds / bring.seconds;
  console.log(`merely parsing   ${parse.seconds.toFixed(2)} s, ${parse.memoryMegabytes.toFixed(0)} MB at most`);
  console.log(
    `bringing in      ${bring.seconds.toFixed(2)} s, ${memory.toFixed(0)} MB at most (goal: under ${goals.memoryMegabytes})`,
  );
  console.log(`longest stall    ${stall.toFixed(0)} ms of the main thread`);
  console.log(`ratio of rates   ${ratio.toFixed(2)} (goal: at least ${goals.ratio})`);
  if (rowCount >= 1_000_000 && (ratio < goals.ratio || memory >= goals.memoryMegabytes)) process.exitCode = 1;
}

const [side, path] = process.argv.slice(2);
if (side === 'parse' || side === 'import')
  void measure(side, path).then((measured) => console.log(JSON.stringify(measured)));
else void compare(Number(side ?? 1_000_000));
