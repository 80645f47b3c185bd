/**
 * Bundles each contract into one JSON document (dist/openapi/*.json, what the service loads) and
 * generates the types that all three programs share (openapi/types/*.ts).
 */
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { bundle, createConfig } from '@redocly/openapi-core';
import openapiTypescript, { astToString } from 'openapi-typescript';

const here = dirname(fileURLToPath(import.meta.url));
const outputFolder = join(here, '..', 'dist', 'openapi');
const typesFolder = join(here, 'types');

async function writeIfChanged(path, text) {
  const before = await readFile(path, 'utf8').catch(() => undefined);
  if (before !== text) await writeFile(path, text);
}

async function bundleContract(name) {
  const config = await createConfig({});
  const { bundle: document, problems } = await bundle({ config, ref: join(here, `${name}.yaml`) });
  const errors = problems.filter((problem) => problem.severity === 'error');
  if (errors.length > 0) throw new Error(`openapi/${name}.yaml: ${errors.map((error) => error.message).join('; ')}`);
  const json = JSON.stringify(document.parsed, null, 1);
  await writeIfChanged(join(outputFolder, `${name}.json`), json);
  // The checks of values stay with the validators; types need the shapes alone.
  const types = await openapiTypescript(json, { defaultNonNullable: false, emptyObjectsUnknown: true });
  await writeIfChanged(join(typesFolder, `${name}.ts`), astToString(types));
}

await mkdir(outputFolder, { recursive: true });
await mkdir(typesFolder, { recursive: true });
for (const name of ['desk', 'partner']) await bundleContract(name);
