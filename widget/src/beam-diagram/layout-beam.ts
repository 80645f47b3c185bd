import { BoxTexts, outwardNeed, PICTURE_MARGIN, PlacedBox, placeBox, sizeBoxes } from './beam-boxes';
import { BeamLayout, BeamWeight, Hanging, Segment } from './beam-layout';
import { BeamScale, scaleFor, ticksOf } from './beam-scale';
import { selectWeights } from './beam-selection';
import { tiltOf } from './beam-tilt';
import { BeamContribution, sumOf } from './contribution';
import { assignLanes } from './lanes';

const BOX_HEIGHT = 19;
const LANE_HEIGHT = 27;
const HEAD = 30;
const FOOT = 26;
const PIVOT_HEIGHT = 20;
const BEAM_CLEARANCE = 12;
const LEAST_WIDTH = 240;

export interface LayoutOptions extends BoxTexts {
  readonly width: number;
}

/** Places a case's contributions on the beam. The same contributions, width and texts always give the same picture. */
export function layoutBeam(contributions: readonly BeamContribution[], options: LayoutOptions): BeamLayout {
  const width = Math.max(LEAST_WIDTH, options.width);
  const { drawn, gathered } = selectWeights(contributions);
  const boxes = sizeBoxes(drawn, width, options);
  const scale = scaleFor(boxes.map(outwardNeed), width, PICTURE_MARGIN);
  const placed = boxes.map((box) => placeBox(box, scale, width));
  const loads = inLanes(placed, 'load', scale.pivotX);
  const floats = inLanes(placed, 'float', scale.pivotX);
  const tiltDegrees = tiltOf(contributions);
  const heights = heightsFor({ tiltDegrees, scale, loadLanes: loads.laneCount, floatLanes: floats.laneCount });
  const { beamAt, pivotY } = heights;
  const [left, right] = [scale.pivotX - scale.halfLength, scale.pivotX + scale.halfLength];
  return {
    width,
    height: heights.rulesTo + FOOT,
    tiltDegrees,
    pivot: { x: scale.pivotX, y: pivotY },
    level: { x1: left, y1: pivotY, x2: right, y2: pivotY },
    beam: { x1: left, y1: beamAt(left), x2: right, y2: beamAt(right) },
    ticks: ticksOf(scale),
    weights: [
      ...floats.items.map((item) => standing(item, heights)),
      ...loads.items.map((item) => hanging(item, heights)),
    ],
    rulesTo: heights.rulesTo,
    sum: sumOf(contributions),
    gatheredCount: gathered.length,
  };
}

interface LanedBox extends PlacedBox {
  readonly lane: number;
}

function inLanes(
  placed: readonly PlacedBox[],
  hangs: Hanging,
  pivotX: number,
): { items: readonly LanedBox[]; laneCount: number } {
  const boxes = placed.filter((box) => box.hangs === hangs);
  const lanes = assignLanes(boxes, pivotX);
  return {
    items: boxes.map((box, index) => ({ ...box, lane: lanes[index] })),
    laneCount: lanes.reduce((most, lane) => Math.max(most, lane + 1), 0),
  };
}

interface Heights {
  readonly pivotY: number;
  readonly beamAt: (x: number) => number;
  /** Bottom of the lowest lane of floats. */
  readonly floatsTo: number;
  /** Top of the highest lane of loads. */
  readonly loadsFrom: number;
  readonly rulesTo: number;
}

interface HeightsOptions {
  readonly tiltDegrees: number;
  readonly scale: BeamScale;
  readonly loadLanes: number;
  readonly floatLanes: number;
}

/** Floats, the tilted beam and loads take turns from the top, each clear of the beam's ends. */
function heightsFor({ tiltDegrees, scale, loadLanes, floatLanes }: HeightsOptions): Heights {
  const slope = Math.tan((tiltDegrees * Math.PI) / 180);
  const rise = Math.abs(slope) * scale.halfLength;
  const floatsTo = HEAD + floatLanes * LANE_HEIGHT;
  const pivotY = floatsTo + BEAM_CLEARANCE + rise;
  const loadsFrom = pivotY + Math.max(rise + BEAM_CLEARANCE, PIVOT_HEIGHT + 6);
  return {
    pivotY,
    beamAt: (x) => pivotY + slope * (x - scale.pivotX),
    floatsTo,
    loadsFrom,
    rulesTo: loadsFrom + loadLanes * LANE_HEIGHT,
  };
}

function hanging(item: LanedBox, { loadsFrom, beamAt }: Heights): BeamWeight {
  const y = loadsFrom + item.lane * LANE_HEIGHT;
  return weightOf(item, y, { x1: item.ropeX, y1: beamAt(item.ropeX), x2: item.ropeX, y2: y });
}

function standing(item: LanedBox, { floatsTo, beamAt }: Heights): BeamWeight {
  const y = floatsTo - item.lane * LANE_HEIGHT - BOX_HEIGHT;
  return weightOf(item, y, { x1: item.ropeX, y1: beamAt(item.ropeX), x2: item.ropeX, y2: y + BOX_HEIGHT });
}

function weightOf(item: LanedBox, y: number, rope: Segment): BeamWeight {
  const { of, hangs, moves, lane, figure, fullLabel, drawnLabel, outward } = item;
  return {
    input: of.input,
    hangs,
    moves,
    lane,
    arm: of.arm,
    mass: of.mass,
    contribution: of.contribution,
    x: item.box.from,
    y,
    width: item.width,
    height: BOX_HEIGHT,
    figure,
    label: drawnLabel,
    fullLabel,
    labelX: outward === 1 ? item.label.from : item.label.to,
    labelAnchor: outward === 1 ? 'start' : 'end',
    rope,
  };
}
