import { assignLanes, LaneItem } from './lanes';

const PIVOT = 100;

function item(ropeX: number, labelWidth = 30, boxWidth = 20): LaneItem {
  const box = { from: ropeX - boxWidth / 2, to: ropeX + boxWidth / 2 };
  const label =
    ropeX < PIVOT
      ? { from: box.from - 5 - labelWidth, to: box.from - 5 }
      : { from: box.to + 5, to: box.to + 5 + labelWidth };
  return { ropeX, box, label };
}

describe('assignLanes', () => {
  it('keeps weights that are clear of each other in the lane nearest the beam', () => {
    expect(assignLanes([item(20), item(180)], PIVOT)).toEqual([0, 0]);
  });

  it('gives the first lane to the outermost of two that collide', () => {
    expect(assignLanes([item(120), item(130)], PIVOT)).toEqual([1, 0]);
    expect(assignLanes([item(70), item(80)], PIVOT)).toEqual([0, 1]);
  });

  it('goes back to the first lane as soon as there is room', () => {
    expect(assignLanes([item(180), item(175), item(105)], PIVOT)).toEqual([0, 1, 0]);
  });

  it('does not let a label cover the rope of a weight in a further lane', () => {
    const outermost = item(180, 30);
    const behind = item(172, 30);
    const inner = item(120, 40);
    expect(assignLanes([outermost, behind, inner], PIVOT)).toEqual([0, 1, 2]);
  });

  it('keeps apart what straddles the pivot from both sides', () => {
    expect(assignLanes([item(97), item(103)], PIVOT)).toEqual([0, 1]);
  });

  it('stacks weights at one place in a lane each', () => {
    expect(assignLanes([item(150), item(150), item(150)], PIVOT)).toEqual([0, 1, 2]);
  });

  it('has nothing to do for no weights', () => {
    expect(assignLanes([], PIVOT)).toEqual([]);
  });
});
