import { askedCases } from './asked-cases';

const now = Date.parse('2026-12-01T12:00:00.000Z');

describe('the cases that partners ask in the demonstration', () => {
  const cases = askedCases(now, 420);

  it('are the same every time', () => {
    expect(askedCases(now, 420)).toEqual(cases);
  });

  it('come in the order of time, none of them after now', () => {
    const times = cases.map((asked) => asked.at);
    expect(times).toEqual([...times].sort((first, second) => first - second));
    expect(times[times.length - 1]).toBeLessThan(now);
  });

  it('are thousands, from all three partners, for all three estimators', () => {
    expect(cases.length).toBeGreaterThan(3000);
    expect(new Set(cases.map((asked) => `${asked.partner} ${asked.slug}`))).toEqual(
      new Set([
        'northquay refit-labour',
        'northquay crane-time',
        'northquay antifouling-paint',
        'pellTarn refit-labour',
        'outerShoal refit-labour',
      ]),
    );
  });

  it('come in batches from the insurer, within a minute on the third of a month', () => {
    const batch = cases.filter(
      (asked) => asked.partner === 'outerShoal' && new Date(asked.at).toISOString().startsWith('2026-11'),
    );
    expect(batch.length).toBeGreaterThanOrEqual(70);
    expect(new Set(batch.map((asked) => new Date(asked.at).toISOString().slice(0, 16)))).toEqual(
      new Set(['2026-11-03T06:00']),
    );
  });
});
