/** What takes room in a lane: a box with its rope in the middle, and a label outward of the box. */
export interface LaneItem {
  readonly ropeX: number;
  readonly box: Span;
  readonly label: Span;
}

export interface Span {
  readonly from: number;
  readonly to: number;
}

const CLEARANCE = 4;

/**
 * Lane 0 is nearest the beam. Greedy: from the outermost item inward, each takes the first lane in which its box and label
 * are clear of those already there, no rope of a further lane runs through them, and its own rope runs through no label.
 * Going inward, a new lane always satisfies this: labels point outward, so the rope of an inner item never meets them.
 */
export function assignLanes(items: readonly LaneItem[], pivotX: number): readonly number[] {
  const lanes: number[] = new Array<number>(items.length).fill(-1);
  const outermostFirst = items
    .map((_, index) => index)
    .sort((a, b) => distance(items[b]) - distance(items[a]) || a - b);
  const placed: number[] = [];
  for (const index of outermostFirst) {
    let lane = 0;
    while (
      !placed.every((other) => areClear({ item: items[index], lane }, { item: items[other], lane: lanes[other] }))
    ) {
      lane++;
    }
    lanes[index] = lane;
    placed.push(index);
  }
  return lanes;

  function distance({ ropeX }: LaneItem): number {
    return Math.abs(ropeX - pivotX);
  }
}

interface Placed {
  readonly item: LaneItem;
  readonly lane: number;
}

function areClear(one: Placed, other: Placed): boolean {
  if (one.lane === other.lane) {
    return !overlap(extentOf(one.item), extentOf(other.item));
  }
  const [near, far] = one.lane < other.lane ? [one, other] : [other, one];
  return !overlap(near.item.label, { from: far.item.ropeX, to: far.item.ropeX });
}

function overlap(a: Span, b: Span): boolean {
  return a.from < b.to + CLEARANCE && b.from < a.to + CLEARANCE;
}

function extentOf({ box, label }: LaneItem): Span {
  return { from: Math.min(box.from, label.from), to: Math.max(box.to, label.to) };
}
