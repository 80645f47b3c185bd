import { shortenTo, textWidth } from './text-width';

describe('textWidth', () => {
  it('grows with the text and the size', () => {
    expect(textWidth('Beam', 11)).toBeGreaterThan(textWidth('Bea', 11));
    expect(textWidth('Beam', 22)).toBeCloseTo(2 * textWidth('Beam', 11), 10);
  });
  it('knows wide letters from narrow ones', () => {
    expect(textWidth('WWW', 10)).toBeGreaterThan(2 * textWidth('lll', 10));
  });
});

describe('shortenTo', () => {
  it('leaves a text that fits', () => {
    expect(shortenTo('Draught', 200, 11)).toBe('Draught');
  });
  it.each([20, 40, 60])('cuts with an ellipsis to %d pixels', (room) => {
    const cut = shortenTo('Displacement at full load', room, 11);
    expect(cut.endsWith('…')).toBe(true);
    expect(textWidth(cut, 11)).toBeLessThanOrEqual(room);
  });
  it('keeps one character however little room there is', () => {
    expect(shortenTo('Displacement', 0, 11)).toBe('D…');
  });
});
