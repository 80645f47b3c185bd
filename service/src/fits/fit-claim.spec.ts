import { mayBeClaimed, staleAfterMs } from './fit-claim';

const nowMs = Date.parse('2026-11-03T09:00:00.000Z');
const at = (agoMs: number): string => new Date(nowMs - agoMs).toISOString();
const view = { nowMs, claimName: 'desk:20:own', isAlive: (processId: number) => processId === 20 || processId === 21 };

describe('a fit may be claimed', () => {
  it.each([
    ['when it waits', { state: 'queued', claimedBy: null, claimedAt: null }, true],
    [
      'not while this process runs it',
      { state: 'running', claimedBy: 'desk:20:own', claimedAt: at(staleAfterMs * 2) },
      false,
    ],
    [
      'not while another living process runs it',
      { state: 'running', claimedBy: 'desk:21:other', claimedAt: at(1000) },
      false,
    ],
    [
      'when a living process has said nothing for too long',
      { state: 'running', claimedBy: 'desk:21:other', claimedAt: at(staleAfterMs + 1) },
      true,
    ],
    ['when its process has ended', { state: 'running', claimedBy: 'desk:22:gone', claimedAt: at(1000) }, true],
    [
      'not while another runner of this very process has it',
      { state: 'running', claimedBy: 'desk:20:beside', claimedAt: at(1000) },
      false,
    ],
    [
      'not from another machine before its claim is stale',
      { state: 'running', claimedBy: 'yard:22:away', claimedAt: at(1000) },
      false,
    ],
  ] as const)('%s', (_title, fit, expected) => {
    expect(mayBeClaimed({ id: 'fit00001', ...fit }, view)).toBe(expected);
  });
});
