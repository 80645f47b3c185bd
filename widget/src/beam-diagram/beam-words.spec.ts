import { captionOf, describeBeam, wordsFor } from './beam-words';
import { BeamEvaluation } from './contribution';
import { layoutBeam } from './layout-beam';

const refit: BeamEvaluation = {
  value: 512.3781,
  typical: 424.2,
  unit: 'hours',
  scale: 'original',
  interval: { low: 440.2, high: 590.1 },
  contributions: [
    { input: 'displacement', label: 'Displacement', arm: 1.4, mass: 34.2, contribution: 47.88 },
    { input: 'year-built', label: 'Year built', arm: -1.8, mass: 22.4, contribution: 40.3, float: true },
  ],
};
const loggedSum = Math.log(512.3781 / 424.2);
const logged: BeamEvaluation = {
  ...refit,
  scale: 'log',
  contributions: [
    { input: 'displacement', label: 'Displacement', arm: 1.4, mass: loggedSum / 1.4, contribution: loggedSum },
  ],
};

function plain(text: string): string {
  return text.replace(/[\u00a0\u202f]/g, ' ');
}

function sentences(evaluation: BeamEvaluation): { description: string; caption: string } {
  const words = wordsFor(evaluation, 'en-GB');
  const layout = layoutBeam(evaluation.contributions, { width: 480, figure: words.moves, farArm: words.farArm });
  return {
    description: plain(describeBeam(evaluation, layout, words)),
    caption: plain(captionOf(evaluation, layout, words)),
  };
}

describe('the words of the beam', () => {
  it('give contributions the digits of the estimate', () => {
    const words = wordsFor(refit, 'en-GB');
    expect(words.moves(47.88)).toBe('+48');
    expect(plain(words.amount(512.3781))).toBe('512 hours');
    expect(words.mass(34.2)).toBe('34');
    expect(words.arm(-1.8)).toBe('−1.8');
    expect(words.farArm(14.6)).toBe('at +15 SD');
  });

  it('write factors on the log scale, and the logarithm beside', () => {
    const words = wordsFor(logged, 'en-GB');
    expect(plain(words.moves(loggedSum))).toBe('× 1.21');
    expect(words.logMoves(loggedSum)).toBe('+0.189');
    expect(words.mass(loggedSum / 1.4)).toBe('0.135');
  });

  it('name both ends and what moves the estimate most', () => {
    expect(sentences(refit).description).toBe(
      'The typical case comes to 424 hours, this case to 512 hours. What moves it most: Displacement raises it, +48 hours; Year built raises it, +40 hours.',
    );
  });

  it('say so when nothing moves it', () => {
    const still = { ...refit, value: 424.2, contributions: [] };
    expect(sentences(still).description).toContain('Nothing moves it.');
  });

  it('put the sum and the typical value into the caption', () => {
    expect(sentences(refit).caption).toContain('+88 hours against a typical 424 hours');
    expect(sentences(refit).caption).toContain('floats (round, dashed) lift it');
  });

  it('say in the caption that figures are factors on the log scale', () => {
    const { caption } = sentences(logged);
    expect(caption).toContain('the figure is the factor by which the input changes the estimate');
    expect(caption).toContain('× 1.21 on a typical 424 hours');
    expect(caption).not.toContain('float');
  });

  it('say how many inputs the others are', () => {
    const contributions = Array.from({ length: 15 }, (_, index) => ({
      input: `i${index}`,
      arm: 1,
      mass: 1,
      contribution: 1,
    }));
    expect(sentences({ ...refit, contributions }).caption).toContain('“The others” are 4 smaller inputs together.');
  });
});
