import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** The checkout's folder, from the sources as from `dist`: the nearest one that holds angular.json. */
function findRootFolder(from: string): string {
  if (existsSync(join(from, 'angular.json'))) return from;
  const parent = dirname(from);
  if (parent === from) throw new Error('The folder that holds angular.json was not found above the service.');
  return findRootFolder(parent);
}

export const rootFolder: string = findRootFolder(__dirname);
