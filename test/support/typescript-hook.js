/** Lets a worker thread that a test starts read the service's TypeScript, as jest does for the test itself. */
const { readFileSync } = require('node:fs');
const { transformSync } = require('@swc/core');

require.extensions['.ts'] = (module, filename) => {
  const { code } = transformSync(readFileSync(filename, 'utf8'), {
    filename,
    jsc: { target: 'es2022', parser: { syntax: 'typescript' } },
    module: { type: 'commonjs' },
    sourceMaps: 'inline',
  });
  module._compile(code, filename);
};
