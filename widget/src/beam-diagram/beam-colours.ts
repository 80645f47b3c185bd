/**
 * Every colour of the diagram, as the custom property to set and its default. They are written as presentation attributes
 * of the SVG, so the picture needs no stylesheet and a page without inline styles may show it.
 */
export const BEAM_COLOURS = {
  ink: { property: '--tb-ink', fallback: '#16242C' },
  /** Ground of the picture: behind it, and around labels. */
  ground: { property: '--tb-sheet', fallback: '#FFFFFF' },
  muted: { property: '--tb-slate', fallback: '#56666F' },
  rule: { property: '--tb-rule', fallback: '#D9D4C7' },
  pivot: { property: '--tb-brass', fallback: '#8A5F12' },
  raises: { property: '--tb-beam-raises', fallback: '#D8BC78' },
  lowers: { property: '--tb-beam-lowers', fallback: '#E8E4D9' },
  /** Text on either fill. */
  figure: { property: '--tb-beam-figure', fallback: '#16242C' },
  /** Outline of a box, and the ropes. */
  outline: { property: '--tb-beam-outline', fallback: '#56666F' },
} as const;

export type BeamColour = keyof typeof BEAM_COLOURS;

export type BeamPaint = Readonly<Record<BeamColour, string>>;

export const BEAM_PAINT: BeamPaint = {
  ink: paint('ink'),
  ground: paint('ground'),
  muted: paint('muted'),
  rule: paint('rule'),
  pivot: paint('pivot'),
  raises: paint('raises'),
  lowers: paint('lowers'),
  figure: paint('figure'),
  outline: paint('outline'),
};

function paint(colour: BeamColour): string {
  const { property, fallback } = BEAM_COLOURS[colour];
  return `var(${property}, ${fallback})`;
}
