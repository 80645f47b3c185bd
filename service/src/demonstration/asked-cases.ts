import { antifoulingInputs, drawAntifoulingCase } from './antifouling-records';
import { craneInputs, drawCraneCase } from './crane-records';
import { Draws } from './draws';
import { drawRefitCase, refitInputs } from './refit-records';

const dayMs = 24 * 60 * 60 * 1000;
const minuteMs = 60 * 1000;

export const partnerParts = ['northquay', 'pellTarn', 'outerShoal'] as const;
export type PartnerPart = (typeof partnerParts)[number];
export type CaseInputs = Readonly<Record<string, string | number | null>>;

export interface AskedCase {
  readonly at: number;
  readonly partner: PartnerPart;
  readonly slug: string;
  readonly inputs: CaseInputs;
}

/** Now and then a boat larger than the yards have seen, and ballast that nobody knows. */
function refitCase(draws: Draws): CaseInputs {
  const inputs: Record<string, string | number | null> = { ...refitInputs(drawRefitCase(draws)) };
  if (draws.chance(0.02))
    Object.assign(inputs, { 'length overall (m)': draws.whole(23, 29), 'displacement (t)': draws.whole(60, 90) });
  if (draws.chance(0.12)) inputs['ballast (t)'] = null;
  return inputs;
}

function drawInputs(draws: Draws, slug: string): CaseInputs {
  if (slug === 'refit-labour') return refitCase(draws);
  return slug === 'crane-time' ? craneInputs(drawCraneCase(draws)) : antifoulingInputs(drawAntifoulingCase(draws));
}

/** Between eight and six in the yards' day, seldom at weekends. */
function casesOfDay(
  draws: Draws,
  day: number,
  usual: { readonly partner: PartnerPart; readonly slug: string; readonly perDay: number },
): AskedCase[] {
  const weekend = [0, 6].includes(new Date(day).getUTCDay());
  const expected = usual.perDay * (weekend ? 0.15 : 1);
  const count = Math.floor(expected) + (draws.chance(expected % 1) ? 1 : 0);
  const { partner, slug } = usual;
  return Array.from({ length: count }, () => ({
    at: day + draws.between(8, 18) * 60 * minuteMs,
    partner,
    slug,
    inputs: drawInputs(draws, slug),
  }));
}

/** A portfolio sent through in one go on the third of the month. */
function batchOfMonth(draws: Draws, day: number): AskedCase[] {
  if (new Date(day).getUTCDate() !== 3) return [];
  const start = day + 6 * 60 * minuteMs;
  return Array.from({ length: draws.whole(70, 95) }, (_, position) => ({
    at: start + position * 400,
    partner: 'outerShoal' as const,
    slug: 'refit-labour',
    inputs: refitCase(draws),
  }));
}

/** What the partners asked in the days before `now`, oldest first. The same seed asks the same cases. */
export function askedCases(now: number, daysBefore: number): AskedCase[] {
  const draws = new Draws(4409);
  const today = now - (now % dayMs);
  const cases: AskedCase[] = [];
  for (let back = daysBefore; back >= 0; back -= 1) {
    const day = today - back * dayMs;
    const growth = 0.6 + 0.8 * (1 - back / daysBefore);
    cases.push(
      ...casesOfDay(draws, day, { partner: 'northquay', slug: 'refit-labour', perDay: 2.4 * growth }),
      ...casesOfDay(draws, day, { partner: 'northquay', slug: 'crane-time', perDay: 2.1 * growth }),
      ...casesOfDay(draws, day, { partner: 'northquay', slug: 'antifouling-paint', perDay: 1.6 * growth }),
      ...casesOfDay(draws, day, { partner: 'pellTarn', slug: 'refit-labour', perDay: 2.2 * growth }),
      ...batchOfMonth(draws, day),
    );
  }
  return cases.filter((asked) => asked.at < now).sort((first, second) => first.at - second.at);
}
