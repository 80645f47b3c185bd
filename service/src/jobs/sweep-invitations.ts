import type { Clock } from '../clock';
import type { InvitationsStore } from '../people/invitations-store';
import type { Job } from './job';

const dayMs = 24 * 60 * 60 * 1000;

/** Ended invitations are kept for a month, so that whoever opens an old link is told that it has run out. */
const keptMs = 30 * dayMs;

export function sweepInvitations(invitations: InvitationsStore, clock: Clock): Job {
  return {
    name: 'sweep-invitations',
    everyMs: dayMs,
    run: async () => {
      await invitations.removeEndedBefore(new Date(clock.now().getTime() - keptMs).toISOString());
    },
  };
}
