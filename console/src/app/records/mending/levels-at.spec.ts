import { HULL } from '../testing/refits';
import { levelsAt } from './levels-at';

describe('the levels of a column after some steps', () => {
  it('are those of the revision while no step changes them', () => {
    expect(levelsAt([HULL], [{ kind: 'drop-repeated-rows' }], HULL.name)).toEqual(HULL.levels);
  });

  it('are followed through another name and add up where they were mapped', () => {
    const steps = [
      { kind: 'rename', column: HULL.name, to: 'Hull' },
      { kind: 'map-levels', column: 'Hull', levels: { aluminium: 'metal', steel: 'metal' } },
    ] as const;
    expect(levelsAt([HULL], steps, 'Hull')).toEqual([
      { value: 'GRP', count: 1500 },
      { value: 'wood', count: 300 },
      { value: 'metal', count: 200 },
    ]);
  });

  it.each([
    ['its rare levels were joined', { kind: 'join-rare-levels', column: HULL.name, fewerThan: 9, into: 'other' }],
    ['it was made a category', { kind: 'set-kind', column: HULL.name, to: 'category' }],
  ] as const)('are not known once %s', (_, step) => {
    expect(levelsAt([HULL], [step], HULL.name)).toBeUndefined();
  });

  it('are not known of a column that the revision does not have', () => {
    expect(levelsAt([HULL], [], 'Rig')).toBeUndefined();
  });
});
