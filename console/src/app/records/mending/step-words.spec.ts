import type { MendStep } from '../../api/contract';
import { wordsOfStep } from './step-words';

describe('a step in words', () => {
  it.each<[MendStep, string]>([
    [{ kind: 'rename', column: 'Beam', to: 'Width' }, 'Rename Beam to Width'],
    [{ kind: 'set-unit', column: 'Beam', unit: null }, 'Take the unit of Beam away'],
    [{ kind: 'set-kind', column: 'Rig', to: 'category' }, 'Read Rig as a category'],
    [
      { kind: 'convert-unit', column: 'Beam', factor: 1 / 0.3048, unit: 'ft', where: '[Beam] < 3' },
      'Multiply Beam by 3.28084 where [Beam] < 3; its unit is ft afterwards',
    ],
    [{ kind: 'convert-unit', column: 'Beam', factor: 10, rows: [3, 14] }, 'Multiply Beam by 10 in rows 3, 14'],
    [{ kind: 'map-levels', column: 'Hull', levels: { grp: 'GRP' } }, 'Map levels of Hull: “grp” to “GRP”'],
    [{ kind: 'set-missing', column: 'Beam', rows: [3] }, 'Set Beam to missing in row 3'],
    [{ kind: 'drop-rows', where: '[Beam] is missing' }, 'Drop the rows where [Beam] is missing'],
    [{ kind: 'drop-rows', rows: [1, 2, 3, 4, 5, 6] }, 'Drop 6 rows given by number'],
    [
      { kind: 'join-rare-levels', column: 'Rig', fewerThan: 1000, into: 'other' },
      'Join levels of Rig with fewer than 1,000 rows into “other”',
    ],
    [{ kind: 'derive', name: 'Area', formula: '[Beam] ^ 2', unit: 'm²' }, 'Add Area, in m², = [Beam] ^ 2'],
  ])('%j', (step, words) => {
    expect(wordsOfStep(step)).toBe(words);
  });
});
