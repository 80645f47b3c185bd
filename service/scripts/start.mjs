/** `npm start`: installs, builds what changed, then runs the service, which migrates and seeds. */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { build, install, rootFolder } from './build.mjs';

install();
build();
const service = spawn(process.execPath, [join(rootFolder, 'dist', 'service', 'src', 'main.js')], {
  cwd: rootFolder,
  stdio: 'inherit',
});
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => service.kill(signal));
service.on('exit', (code, signal) => process.exit(signal ? 0 : (code ?? 1)));
