/** `npm run dev`: the same as `npm start`, and every program is built again as its sources change. */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { build, forget, install, rootFolder } from './build.mjs';

install();
build();
forget(['console', 'widget']);
const bin = (name) => join(rootFolder, 'node_modules', '.bin', name);
const watchers = [
  [
    process.execPath,
    '--watch-path=openapi/paths',
    '--watch-path=openapi/schemas',
    '--watch-preserve-output',
    'openapi/bundle.mjs',
  ],
  [bin('tsc'), '-p', 'tsconfig.service.json', '--watch', '--preserveWatchOutput'],
  [bin('ng'), 'build', 'console', '--watch', '--configuration', 'development'],
  [bin('ng'), 'build', 'widget', '--watch', '--configuration', 'development'],
  [process.execPath, '--watch', '--watch-preserve-output', 'dist/service/src/main.js'],
];
const env = { ...process.env, NG_CLI_ANALYTICS: 'false' };
const children = watchers.map(([file, ...args]) => spawn(file, args, { cwd: rootFolder, stdio: 'inherit', env }));
for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, () => {
    for (const child of children) child.kill(signal);
    process.exit(0);
  });
}
