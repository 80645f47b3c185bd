/**
 * `npm test`: installs what it needs, builds, then runs lint, type checks and every test. The last line is
 * `N passed, N failed`.
 */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { spawnSync } from 'node:child_process';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build, install, rootFolder, run } from '../service/scripts/build.mjs';

const bin = (name) => join(rootFolder, 'node_modules', '.bin', name);
const folder = mkdtempSync(join(tmpdir(), 'tarebeam-run-'));
const total = { passed: 0, failed: 0 };

function chromiumPath() {
  return [process.env.CHROMIUM, '/usr/bin/chromium', '/usr/bin/chromium-browser'].find(
    (path) => path && existsSync(path),
  );
}

/** The browser tests drive Debian's chromium. */
function requireChromium() {
  if (chromiumPath()) return true;
  console.log('Installing chromium for the browser tests.');
  const apt = (...args) =>
    spawnSync('apt-get', args, { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } })
      .status === 0;
  if (process.getuid?.() === 0 && apt('update', '-qq') && apt('install', '-y', '-qq', 'chromium')) return true;
  console.error(
    'The browser tests need chromium, and it may not be installed from here. Install it as root (apt-get install chromium) or name one in CHROMIUM.',
  );
  return false;
}

function count(passed, what) {
  if (passed) total.passed += 1;
  else {
    total.failed += 1;
    console.error(`FAILED: ${what}`);
  }
}

function check(what, command) {
  console.log(`\n== ${what}`);
  count(run(command) === 0, what);
}

function jest(what, args) {
  console.log(`\n== ${what}`);
  const report = join(folder, `${what.replaceAll(' ', '-')}.json`);
  run([bin('jest'), '--json', `--outputFile=${report}`, ...args], { stdio: ['ignore', 'ignore', 'inherit'] });
  if (!existsSync(report)) return count(false, `${what} did not report`);
  const result = JSON.parse(readFileSync(report, 'utf8'));
  total.passed += result.numPassedTests;
  total.failed += result.numFailedTests + result.numRuntimeErrorTestSuites;
  if (result.numTotalTests === 0) count(false, `${what} ran no test`);
}

install();
build();
check('type check of the tests', [bin('tsc'), '-p', 'tsconfig.test.json']);
check('type check of the specs', [bin('tsc'), '-p', 'tsconfig.spec.json']);
check('lint', [bin('eslint'), '.']);
jest('service and interface', ['--selectProjects', 'service', 'numerics', 'migrations', 'api', '--maxWorkers=2']);
jest('console and widget', ['--selectProjects', 'console', 'widget', '--maxWorkers=2']);
if (requireChromium()) jest('browser', ['--selectProjects', 'browser', '--runInBand']);
else count(false, 'browser tests');

rmSync(folder, { recursive: true, force: true });
console.log(`\n${total.passed} passed, ${total.failed} failed`);
process.exitCode = total.failed === 0 ? 0 : 1;
