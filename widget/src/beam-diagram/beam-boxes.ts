import { Hanging, Movement } from './beam-layout';
import { BeamScale, isBeyond, OutwardNeed, placeOf } from './beam-scale';
import { BeamContribution, labelOf } from './contribution';
import { LaneItem } from './lanes';
import { shortenTo, textWidth } from './text-width';

export const FIGURE_SIZE = 10.5;
export const LABEL_SIZE = 11;
export const PICTURE_MARGIN = 6;
const LABEL_GAP = 5;
const FIGURE_PADDING = 10;

export interface BoxTexts {
  /** The figure in a box: c, or its factor on the log scale. */
  readonly figure: (contribution: number) => string;
  /** Said beside the label of a weight that hangs beyond the end of the beam. */
  readonly farArm: (arm: number) => string;
}

export interface Box {
  readonly of: BeamContribution;
  readonly hangs: Hanging;
  readonly moves: Movement;
  readonly width: number;
  readonly figure: string;
  readonly fullLabel: string;
}

export interface PlacedBox extends Box, LaneItem {
  readonly drawnLabel: string;
  readonly outward: 1 | -1;
}

/** Width is proportional to mass, save that a box is never too narrow for its figure. */
export function sizeBoxes(drawn: readonly BeamContribution[], pictureWidth: number, texts: BoxTexts): readonly Box[] {
  const heaviest = drawn.reduce((most, { mass }) => Math.max(most, mass), 0);
  const widest = Math.max(40, Math.min(64, pictureWidth * 0.1));
  return drawn.map((of) => {
    const figure = texts.figure(of.contribution);
    return {
      of,
      hangs: of.float ? 'float' : 'load',
      moves: of.contribution > 0 ? 'raises' : of.contribution < 0 ? 'lowers' : 'nothing',
      width: Math.max(
        textWidth(figure, FIGURE_SIZE) + FIGURE_PADDING,
        heaviest > 0 ? (of.mass / heaviest) * widest : 0,
      ),
      figure,
      fullLabel: isBeyond(of) ? `${labelOf(of)}, ${texts.farArm(of.arm)}` : labelOf(of),
    };
  });
}

export function outwardNeed({ of, width, fullLabel }: Box): OutwardNeed {
  return { arm: of.arm, room: width / 2 + LABEL_GAP + textWidth(fullLabel, LABEL_SIZE) };
}

export function placeBox(box: Box, scale: BeamScale, pictureWidth: number): PlacedBox {
  const ropeX = placeOf(box.of.arm, scale);
  const outward = ropeX < scale.pivotX ? -1 : 1;
  const labelStart = ropeX + outward * (box.width / 2 + LABEL_GAP);
  const room = outward === 1 ? pictureWidth - PICTURE_MARGIN - labelStart : labelStart - PICTURE_MARGIN;
  const drawnLabel = shortenTo(box.fullLabel, room, LABEL_SIZE);
  const labelEnd = labelStart + outward * textWidth(drawnLabel, LABEL_SIZE);
  return {
    ...box,
    drawnLabel,
    outward,
    ropeX,
    box: { from: ropeX - box.width / 2, to: ropeX + box.width / 2 },
    label: { from: Math.min(labelStart, labelEnd), to: Math.max(labelStart, labelEnd) },
  };
}
