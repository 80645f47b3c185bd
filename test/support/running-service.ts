import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { rootFolder } from '../../service/src/root-folder';

export interface RunningService {
  readonly url: string;
  readonly partnerPageUrl: string;
  readonly dataFolder: string;
  /** Everything it printed. */
  output(): string;
  stop(): Promise<void>;
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

async function untilHealthy(url: string, process: ChildProcess, output: () => string, waitMs: number): Promise<void> {
  const deadline = Date.now() + waitMs;
  while (Date.now() < deadline) {
    if (process.exitCode !== null) throw new Error(`The service ended at its start:\n${output()}`);
    const answer = await fetch(`${url}/api/health`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`The service did not answer within ${waitMs / 1000} s:\n${output()}`);
}

/** Starts the built service as `npm start` does, with a data folder and ports of its own. */
export async function startService(
  environment: Readonly<Record<string, string>>,
  waitMs = 60_000,
): Promise<RunningService> {
  const dataFolder = environment['DATA_DIR'] ?? mkdtempSync(join(tmpdir(), 'tarebeam-run-'));
  const [port, partnerPagePort] = [await freePort(), await freePort()];
  const child = spawn(process.execPath, [join(rootFolder, 'dist', 'service', 'src', 'main.js')], {
    cwd: rootFolder,
    env: {
      ...process.env,
      PORT: String(port),
      PARTNER_PAGE_PORT: String(partnerPagePort),
      DATA_DIR: dataFolder,
      ...environment,
    },
  });
  let text = '';
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk: Buffer) => (text += chunk.toString()));
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  const stop = async (): Promise<void> => {
    child.kill('SIGTERM');
    await ended;
    if (environment['DATA_DIR'] === undefined) rmSync(dataFolder, { recursive: true, force: true });
  };
  const url = `http://localhost:${port}`;
  try {
    await untilHealthy(url, child, () => text, waitMs);
  } catch (error) {
    await stop();
    throw error;
  }
  return { url, partnerPageUrl: `http://localhost:${partnerPagePort}`, dataFolder, output: () => text, stop };
}
