/**
 * Installs what package-lock.json lists and builds what changed. Needs nothing but Node.js, since it runs before
 * anything is installed. What was built is remembered by the content of its sources in dist/built.json.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const rootFolder = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const installedMark = join(rootFolder, 'node_modules', '.installed-from');
const builtMark = join(rootFolder, 'dist', 'built.json');
const binary = (name) => join(rootFolder, 'node_modules', '.bin', name);

/** Each part, in the order of building, with the sources whose content decides whether it is built again. */
const parts = [
  { name: 'contract', sources: ['openapi'], result: 'dist/openapi/desk.json', command: ['node', 'openapi/bundle.mjs'] },
  {
    name: 'service',
    sources: ['service', 'migrations', 'openapi', 'tsconfig.json', 'tsconfig.service.json'],
    result: 'dist/service/src/main.js',
    command: [binary('tsc'), '-p', 'tsconfig.service.json'],
  },
  {
    name: 'console',
    sources: ['console', 'widget/src', 'openapi', 'angular.json', 'tsconfig.json', 'tsconfig.console.json'],
    result: 'dist/console/browser/index.html',
    command: [binary('ng'), 'build', 'console'],
  },
  {
    name: 'widget',
    sources: ['widget/src', 'openapi', 'angular.json', 'tsconfig.json', 'tsconfig.widget.json'],
    result: 'dist/widget/browser/main.js',
    command: [binary('ng'), 'build', 'widget'],
  },
];

const isSource = (name) => !/^(types|node_modules|\..*)$/.test(name) && !/\.spec\.ts$/.test(name);

function addToHash(hash, path) {
  if (statSync(path).isFile()) {
    hash.update(path.slice(rootFolder.length)).update(readFileSync(path));
    return;
  }
  for (const name of readdirSync(path).filter(isSource).sort()) addToHash(hash, join(path, name));
}

function contentOf(sources) {
  const hash = createHash('sha256');
  for (const source of [...sources, 'package-lock.json']) addToHash(hash, join(rootFolder, source));
  return hash.digest('hex');
}

export function run(command, options = {}) {
  const [file, ...args] = command;
  const { status, error } = spawnSync(file, args, {
    cwd: rootFolder,
    stdio: 'inherit',
    env: { ...process.env, NG_CLI_ANALYTICS: 'false' },
    ...options,
  });
  if (error) throw error;
  return status ?? 1;
}

function runOrStop(command, what) {
  if (run(command) === 0) return;
  console.error(`${what} failed; the lines above say why.`);
  process.exit(1);
}

function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if ((major === 20 && minor >= 19) || (major === 22 && minor >= 12)) return;
  console.error(
    `Node.js ${process.versions.node} is installed; this needs 20.19 or newer of 20, or 22.12 or newer of 22.`,
  );
  process.exit(1);
}

export function install() {
  requireNode();
  const wanted = createHash('sha256')
    .update(readFileSync(join(rootFolder, 'package-lock.json')))
    .digest('hex');
  if (existsSync(installedMark) && readFileSync(installedMark, 'utf8') === wanted) return;
  console.log('Installing packages. The database driver is compiled, so the first time takes a few minutes.');
  runOrStop(['npm', 'ci', '--no-audit', '--no-fund'], 'Installing');
  writeFileSync(installedMark, wanted);
}

export function build() {
  mkdirSync(join(rootFolder, 'dist'), { recursive: true });
  const built = existsSync(builtMark) ? JSON.parse(readFileSync(builtMark, 'utf8')) : {};
  for (const part of parts) {
    const content = contentOf(part.sources);
    if (built[part.name] === content && existsSync(join(rootFolder, part.result))) continue;
    console.log(`Building the ${part.name}.`);
    runOrStop(part.command, `Building the ${part.name}`);
    built[part.name] = content;
    writeFileSync(builtMark, JSON.stringify(built, null, 1));
  }
}

/** Makes the next `build` build these parts whatever their sources: a watcher puts development builds in their place. */
export function forget(names) {
  const built = JSON.parse(readFileSync(builtMark, 'utf8'));
  for (const name of names) delete built[name];
  writeFileSync(builtMark, JSON.stringify(built, null, 1));
}
