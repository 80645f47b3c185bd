import type { SignInThrottle } from '../people/sign-in-throttle';
import type { Job } from './job';

export function sweepSignInAttempts(throttle: SignInThrottle): Job {
  return { name: 'sweep-sign-in-attempts', everyMs: 24 * 60 * 60 * 1000, run: () => throttle.forgetOld() };
}
