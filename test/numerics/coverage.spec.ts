import { fitRecords } from '../../service/src/regression/fit';
import { evaluateFormula } from '../../service/src/regression/formula/evaluate';
import type { Formula } from '../../service/src/regression/formula/formula';
import { seededRandom, type Random } from '../../service/src/regression/random';
import { normalNumbers } from './invented-yard';
import { numeric, table } from './reference';

/** Noise at one case: its own generator and the case's signal. */
type Noise = (normal: () => number, random: Random, signal: number) => number;

const NOISES: Readonly<Record<string, Noise>> = {
  normal: (normal) => normal(),
  skewed: (_, random) => -Math.log(1 - random()) - 1,
  heteroscedastic: (normal, _, signal) => normal() * Math.exp(0.6 * signal),
};

const INPUTS = 5;
const LEVEL = 0.9;

interface Case {
  readonly inputs: Readonly<Record<string, number>>;
  readonly signal: number;
  readonly target: number;
}

function drawCases(count: number, noise: Noise, random: Random): Case[] {
  const normal = normalNumbers(random);
  return Array.from({ length: count }, () => {
    const readings = Array.from({ length: INPUTS }, normal);
    const signal = readings[0] - 0.5 * readings[1] + 0.25 * readings[2];
    return {
      inputs: Object.fromEntries(readings.map((value, at) => [`x${at}`, value])),
      signal,
      target: signal + noise(normal, random, signal),
    };
  });
}

async function fitCases(cases: readonly Case[]): Promise<Formula> {
  const names = Array.from({ length: INPUTS }, (_, at) => `x${at}`);
  const columns = [
    ...names.map((name) =>
      numeric(
        name,
        cases.map((one) => one.inputs[name]),
      ),
    ),
    numeric(
      'y',
      cases.map((one) => one.target),
    ),
  ];
  const { formula } = await fitRecords(table(columns), {
    target: { column: 'y', transform: 'none' },
    inputs: names.map((column) => ({ column })),
    method: 'ridge',
    penalty: { rule: 'one-standard-error' },
    intervalLevel: LEVEL,
  });
  return formula;
}

interface Simulated {
  readonly covered: boolean;
  readonly coveredGaussian: boolean;
  readonly signal: number;
}

async function simulate(noise: Noise, seed: number): Promise<Simulated[]> {
  const random = seededRandom(seed);
  const found: Simulated[] = [];
  for (let round = 0; round < 25; round += 1) {
    const formula = await fitCases(drawCases(150, noise, random));
    for (const one of drawCases(200, noise, random)) {
      const { interval, gaussianInterval } = evaluateFormula(formula, one.inputs);
      const within = (low: number, high: number): boolean => one.target >= low && one.target <= high;
      found.push({
        covered: within(interval.low, interval.high),
        coveredGaussian: gaussianInterval !== null && within(gaussianInterval.low, gaussianInterval.high),
        signal: one.signal,
      });
    }
  }
  return found;
}

const share = (cases: readonly Simulated[], test: (one: Simulated) => boolean): number =>
  cases.filter(test).length / cases.length;

describe.each(Object.keys(NOISES))(
  'with %s errors (seeded simulation, 25 fits of 150 records, 5,000 new cases)',
  (name) => {
    let simulated: Simulated[];
    beforeAll(async () => {
      simulated = await simulate(NOISES[name], 4711);
      if (process.env['SHOW_DIGITS'] !== undefined) {
        const sorted = simulated.slice().sort((first, second) => first.signal - second.signal);
        const quarters = [0, 1, 2, 3].map((quarter) =>
          share(
            sorted.slice((quarter * sorted.length) / 4, ((quarter + 1) * sorted.length) / 4),
            (one) => one.covered,
          ).toFixed(3),
        );
        process.stdout.write(
          `${name}: CV+ ${share(simulated, (one) => one.covered).toFixed(3)} Gaussian ${share(simulated, (one) => one.coveredGaussian).toFixed(3)} by quarter ${quarters.join(' ')}\n`,
        );
      }
    }, 120_000);

    it('covers within two points of the stated level', () => {
      expect(Math.abs(share(simulated, (one) => one.covered) - LEVEL)).toBeLessThan(0.02);
    });
  },
);

describe('where the default interval fails', () => {
  // It promises coverage over all cases together, not for every kind of case.
  it('covers too often where errors are small and too seldom where they are large', async () => {
    const simulated = (await simulate(NOISES['heteroscedastic'], 4711)).sort(
      (first, second) => first.signal - second.signal,
    );
    const quarter = simulated.length / 4;
    expect(share(simulated.slice(0, quarter), (one) => one.covered)).toBeGreaterThan(LEVEL + 0.05);
    expect(share(simulated.slice(-quarter), (one) => one.covered)).toBeLessThan(LEVEL - 0.05);
  }, 120_000);
});
