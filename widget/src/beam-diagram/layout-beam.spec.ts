import { LABEL_SIZE } from './beam-boxes';
import { BeamLayout, BeamWeight } from './beam-layout';
import { LONGEST_ARM } from './beam-scale';
import { THE_OTHERS } from './beam-selection';
import { BeamContribution, sumOf } from './contribution';
import { layoutBeam } from './layout-beam';
import { textWidth } from './text-width';

const options = {
  figure: (contribution: number): string => `${contribution > 0 ? '+' : '−'}${Math.abs(contribution).toFixed(0)}`,
  farArm: (arm: number): string => `at ${arm.toFixed(0)} SD`,
};

function load(input: string, arm: number, mass: number): BeamContribution {
  return { input, arm, mass, contribution: arm * mass };
}

function float(input: string, arm: number, mass: number): BeamContribution {
  return { input, arm, mass, contribution: -arm * mass, float: true };
}

const refit = [
  load('Displacement', 1.4, 34),
  float('Year built', -1.6, 22),
  load('Scope of work', 1.3, 26),
  load('Length overall', 0.9, 24),
  load('Waterline length', 1, 20),
  load('Ballast', 1.1, 11),
  load('Hull material', -0.6, 18),
  load('Beam', 0.6, 15),
  load('Winter booking', -1.1, 7),
  load('Draught', -0.3, 8),
  load('Rig', -0.3, 6),
];

/** A small generator of uniform numbers (Park and Miller 1988, "minimal standard"), so that the cases are always the same. */
function uniform(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

function randomCase(seed: number): BeamContribution[] {
  const next = uniform(seed);
  return Array.from({ length: 1 + Math.floor(next() * 30) }, (_, index) => {
    const name = 'Longitudinal measurement '.slice(0, 3 + Math.floor(next() * 22)) + index;
    const arm = (next() - 0.5) * (next() < 0.1 ? 30 : 5);
    const mass = next() * next() * 80;
    return next() < 0.35 ? float(name, arm, mass) : load(name, arm, mass);
  });
}

const manyCases = Array.from({ length: 60 }, (_, index) => ({
  seed: 7919 * (index + 1),
  width: [240, 320, 480, 700][index % 4],
}));

function labelSpan({ labelX, labelAnchor, label }: BeamWeight): [number, number] {
  const size = textWidth(label, LABEL_SIZE);
  return labelAnchor === 'start' ? [labelX, labelX + size] : [labelX - size, labelX];
}

function rectangles(weight: BeamWeight): [number, number, number, number][] {
  const [from, to] = labelSpan(weight);
  return [
    [weight.x, weight.y, weight.x + weight.width, weight.y + weight.height],
    [from, weight.y, to, weight.y + weight.height],
  ];
}

function middleOf({ x, width }: BeamWeight): number {
  return x + width / 2;
}

function find({ weights }: BeamLayout, input: string): BeamWeight {
  const found = weights.find((weight) => weight.input === input);
  if (!found) {
    throw new Error(`no weight ${input}`);
  }
  return found;
}

describe('layoutBeam', () => {
  const layout = layoutBeam(refit, { width: 480, ...options });

  it('draws every one of twelve or fewer inputs', () => {
    expect(layout.weights.map(({ input }) => input).sort()).toEqual(refit.map(({ input }) => input).sort());
    expect(layout.gatheredCount).toBe(0);
  });

  it('hangs loads below the beam and stands floats above it', () => {
    for (const weight of layout.weights) {
      const onBeam = weight.rope.y1;
      if (weight.hangs === 'load') {
        expect(weight.y).toBeGreaterThan(onBeam);
        expect(weight.rope.y2).toBe(weight.y);
      } else {
        expect(weight.y + weight.height).toBeLessThan(onBeam);
        expect(weight.rope.y2).toBe(weight.y + weight.height);
      }
    }
    expect(find(layout, 'Year built').hangs).toBe('float');
  });

  it('hangs each weight at its arm', () => {
    const perArm = (middleOf(find(layout, 'Displacement')) - layout.pivot.x) / 1.4;
    for (const weight of layout.weights) {
      expect(middleOf(weight)).toBeCloseTo(layout.pivot.x + weight.arm * perArm, 8);
      expect(weight.rope.x1).toBeCloseTo(middleOf(weight), 8);
      expect(weight.rope.x2).toBe(weight.rope.x1);
    }
  });

  it('fixes ropes on the beam itself', () => {
    const { beam } = layout;
    const slope = (beam.y2 - beam.y1) / (beam.x2 - beam.x1);
    for (const { rope } of layout.weights) {
      expect(rope.y1).toBeCloseTo(beam.y1 + slope * (rope.x1 - beam.x1), 8);
    }
  });

  it('makes a box as wide as its mass, and never too narrow for its figure', () => {
    const heaviest = find(layout, 'Displacement');
    for (const weight of layout.weights) {
      const byMass = (heaviest.width * weight.mass) / heaviest.mass;
      expect(weight.width).toBeGreaterThanOrEqual(byMass - 1e-9);
      expect(weight.width === byMass || weight.width < byMass + 40).toBe(true);
    }
    expect(find(layout, 'Scope of work').width).toBeCloseTo((heaviest.width * 26) / 34, 8);
  });

  it('writes the figure and says which way it moves the estimate', () => {
    expect(find(layout, 'Displacement')).toMatchObject({ figure: '+48', moves: 'raises' });
    expect(find(layout, 'Year built')).toMatchObject({ figure: '+35', moves: 'raises' });
    expect(find(layout, 'Hull material')).toMatchObject({ figure: '−11', moves: 'lowers' });
  });

  it('tilts the raised side of the estimate down, about the pivot', () => {
    expect(layout.beam.y2).toBeGreaterThan(layout.beam.y1);
    expect((layout.beam.y1 + layout.beam.y2) / 2).toBeCloseTo(layout.pivot.y, 8);
    const below = layoutBeam([load('Displacement', -1, 34)], { width: 480, ...options });
    expect(below.beam.y2).toBeLessThan(below.beam.y1);
  });

  it('draws the beam at the angle that it states, 8 degrees at most', () => {
    for (const { beam, tiltDegrees } of [layout, layoutBeam([load('a', 30, 5)], { width: 480, ...options })]) {
      const drawn = (Math.atan2(beam.y2 - beam.y1, beam.x2 - beam.x1) * 180) / Math.PI;
      expect(drawn).toBeCloseTo(tiltDegrees, 8);
      expect(Math.abs(tiltDegrees)).toBeLessThanOrEqual(8);
    }
  });

  it('shows level through the pivot over the whole beam', () => {
    expect(layout.level).toEqual({ x1: layout.beam.x1, x2: layout.beam.x2, y1: layout.pivot.y, y2: layout.pivot.y });
  });

  it('gathers the others of more than twelve and states how many', () => {
    const many = Array.from({ length: 20 }, (_, index) => load(`input ${index}`, 0.5 + index / 20, 20 - index));
    const crowded = layoutBeam(many, { width: 480, ...options });
    expect(crowded.weights).toHaveLength(12);
    expect(crowded.gatheredCount).toBe(9);
    expect(sumOf(crowded.weights)).toBeCloseTo(sumOf(many), 8);
    expect(find(crowded, THE_OTHERS).hangs).toBe('load');
    expect(crowded.sum).toBeCloseTo(sumOf(many), 8);
  });

  it('hangs what lies far beyond at the end of the beam and writes its arm', () => {
    const far = layoutBeam([load('Displacement', 15, 3), load('Beam', 1, 3)], { width: 480, ...options });
    const weight = find(far, 'Displacement');
    const perArm = middleOf(find(far, 'Beam')) - far.pivot.x;
    expect(middleOf(weight)).toBeCloseTo(far.pivot.x + LONGEST_ARM * perArm, 8);
    expect(weight.fullLabel).toBe('Displacement, at 15 SD');
    expect(weight.contribution).toBe(45);
  });

  it('marks typical and whole standard deviations on both sides', () => {
    expect(layout.ticks.map(({ arm }) => arm)).toEqual([-2, -1, 0, 1, 2]);
  });

  it('marks fewer standard deviations where they would crowd', () => {
    const narrow = layoutBeam([load('a', 4, 5), load('b', -4, 5)], { width: 240, ...options });
    const places = narrow.ticks.map(({ x }) => x);
    for (let index = 1; index < places.length; index++) {
      expect(places[index] - places[index - 1]).toBeGreaterThanOrEqual(40);
    }
  });

  it('draws an empty beam, level', () => {
    const empty = layoutBeam([], { width: 480, ...options });
    expect(empty.weights).toHaveLength(0);
    expect(empty.tiltDegrees).toBe(0);
    expect(empty.beam.y1).toBe(empty.beam.y2);
  });

  it('gives the same picture for the same case', () => {
    expect(layoutBeam(refit, { width: 480, ...options })).toEqual(layout);
  });

  describe.each(manyCases)('for a random case (seed $seed) $width wide', ({ seed, width }) => {
    const drawn = layoutBeam(randomCase(seed), { width, ...options });

    it('lets no box or label overlap another', () => {
      const all = drawn.weights.flatMap(rectangles);
      all.forEach(([left, top, right, bottom], index) => {
        for (const [otherLeft, otherTop, otherRight, otherBottom] of all.slice(index + 1)) {
          const apart = right <= otherLeft || otherRight <= left || bottom <= otherTop || otherBottom <= top;
          expect(apart).toBe(true);
        }
      });
    });

    it('runs no rope through a label', () => {
      for (const { rope, input } of drawn.weights) {
        const [top, bottom] = [Math.min(rope.y1, rope.y2), Math.max(rope.y1, rope.y2)];
        for (const other of drawn.weights.filter((weight) => weight.input !== input)) {
          const [from, to] = labelSpan(other);
          const crosses = rope.x1 > from && rope.x1 < to && other.y < bottom && other.y + other.height > top;
          expect(crosses).toBe(false);
        }
      }
    });

    it('puts labels outward of their weight and inside the picture', () => {
      for (const weight of drawn.weights) {
        const [from, to] = labelSpan(weight);
        const outward = middleOf(weight) < drawn.pivot.x ? to <= weight.x : from >= weight.x + weight.width;
        expect(outward).toBe(true);
        expect(from).toBeGreaterThanOrEqual(0);
        expect(to).toBeLessThanOrEqual(drawn.width);
      }
    });

    it('keeps everything inside the height', () => {
      for (const weight of drawn.weights) {
        expect(weight.y).toBeGreaterThan(0);
        expect(weight.y + weight.height).toBeLessThan(drawn.height);
      }
    });
  });
});
