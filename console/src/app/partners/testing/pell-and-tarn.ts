import type { Key, Partner, PartnerSummary } from '../../api/contract';

/** Invented answers of the service for specs: a broker with an embed key on one site and a key that was revoked. */

const INES = { id: 'person00ines', name: 'Ines Caldwell' };

export const boatPages: Key = {
  id: 'key0000boats',
  publicId: '9v3b7n5c',
  lastFour: 'x8Qd',
  kind: 'embed',
  label: 'Boat pages',
  estimators: ['refit-labour'],
  perMinute: 30,
  monthlyQuota: null,
  usedThisMonth: 812,
  expiresAt: null,
  createdAt: '2026-03-02T11:00:00Z',
  createdBy: INES,
  lastUsedAt: '2026-11-30T09:12:00Z',
  revokedAt: null,
  state: 'live',
};

export const trialPage: Key = {
  ...boatPages,
  id: 'key0000trial',
  publicId: '7w1y5t3e',
  label: 'Trial page',
  estimators: 'all',
  monthlyQuota: 1000,
  state: 'revoked',
  revokedAt: '2026-06-02T10:00:00Z',
};

export const pellAndTarn: Partner = {
  id: 'partner0pell',
  name: 'Pell & Tarn Brokers',
  contactEmail: 'web@pellandtarn.example',
  createdAt: '2026-03-01T10:00:00Z',
  estimateCount: 5321,
  sites: [{ id: 'site00000www', origin: 'https://www.pellandtarn.example', createdAt: '2026-03-02T10:00:00Z' }],
  keys: [trialPage, boatPages],
};

export function partnerSummary(number: number): PartnerSummary {
  return {
    id: `partner${String(number).padStart(5, '0')}`,
    name: `Partner ${number}`,
    contactEmail: `desk${number}@partner.example`,
    createdAt: '2026-03-01T10:00:00Z',
    siteCount: 1,
    keyCount: number,
    estimateCount: 100 * number,
    lastUsedAt: number % 2 === 0 ? null : '2026-11-30T09:12:00Z',
  };
}
