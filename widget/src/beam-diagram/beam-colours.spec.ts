import { BEAM_COLOURS, BEAM_PAINT, BeamColour } from './beam-colours';

/** WCAG 2.2, "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: BeamColour, other: BeamColour): number {
  const [light, dark] = [one, other].map((name) => luminance(BEAM_COLOURS[name].fallback)).sort((a, b) => b - a);
  return (light + 0.05) / (dark + 0.05);
}

describe('the default colours of the beam', () => {
  // WCAG 2.2, success criterion 1.4.3: 4.5:1 for text of this size.
  it.each<[BeamColour, BeamColour]>([
    ['ink', 'ground'],
    ['muted', 'ground'],
    ['figure', 'raises'],
    ['figure', 'lowers'],
  ])('set %s on %s legibly', (text, ground) => {
    expect(contrast(text, ground)).toBeGreaterThanOrEqual(4.5);
  });

  // WCAG 2.2, success criterion 1.4.11: 3:1 for what one must see to understand a picture.
  it.each<[BeamColour, BeamColour]>([
    ['ink', 'ground'],
    ['pivot', 'ground'],
    ['outline', 'ground'],
  ])('draw %s visibly on %s', (mark, ground) => {
    expect(contrast(mark, ground)).toBeGreaterThanOrEqual(3);
  });

  it('can each be replaced by a custom property', () => {
    expect(BEAM_PAINT.raises).toBe('var(--tb-beam-raises, #D8BC78)');
    expect(new Set(Object.values(BEAM_COLOURS).map(({ property }) => property)).size).toBe(
      Object.keys(BEAM_COLOURS).length,
    );
  });
});
