import type { MendStep } from '../../api/contract';
import { StepsHistory, moved, replaced, without } from './steps-history';

const step = (column: string): MendStep => ({ kind: 'set-aside', column });
const [A, B, C] = ['A', 'B', 'C'].map(step);

describe('StepsHistory', () => {
  it('goes back to every earlier list and forth again', () => {
    const history = new StepsHistory();
    history.begin([A]);
    history.change([A, B]);
    history.change([B]);
    history.undo();
    expect(history.steps()).toEqual([A, B]);
    history.undo();
    expect([history.steps(), history.canUndo()]).toEqual([[A], false]);
    history.redo();
    history.redo();
    expect([history.steps(), history.canRedo()]).toEqual([[B], false]);
  });

  it('forgets what was undone once something else is changed', () => {
    const history = new StepsHistory();
    history.change([A]);
    history.undo();
    history.change([B]);
    expect(history.canRedo()).toBe(false);
  });

  it('stays as it is where there is nothing to undo or redo', () => {
    const history = new StepsHistory();
    history.begin([A]);
    history.undo();
    history.redo();
    expect(history.steps()).toEqual([A]);
  });
});

describe('a list of steps', () => {
  it.each([
    [0, 2, [B, C, A]],
    [2, 0, [C, A, B]],
    [1, 1, [A, B, C]],
  ])('moves step %d to place %d', (from, to, expected) => {
    expect(moved([A, B, C], from, to)).toEqual(expected);
  });

  it('takes a step out or puts another in its place', () => {
    expect([without([A, B], 0), replaced([A, B], 1, C)]).toEqual([[B], [A, C]]);
  });
});
