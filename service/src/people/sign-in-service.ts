import { timeText, type Clock } from '../clock';
import { DeskError } from '../errors';
import type { Journal } from '../journal/journal';
import { verifyPassword } from './password';
import { emailKeyOf, type PeopleStore } from './people-store';
import type { PersonRecord, SignedInPerson } from './person';
import type { SignInThrottle } from './sign-in-throttle';

export interface SignInAttempt {
  readonly email: string;
  readonly password: string;
  readonly address: string;
}

export class SignInService {
  constructor(
    private readonly people: PeopleStore,
    private readonly throttle: SignInThrottle,
    private readonly journal: Journal,
    private readonly clock: Clock,
  ) {}

  /** The person, or a refusal that is the same for an unknown address, a wrong password and a closed person. */
  async signIn(attempt: SignInAttempt): Promise<SignedInPerson> {
    const subjects = { account: emailKeyOf(attempt.email), address: attempt.address };
    await this.throttle.requireAllowed(subjects);
    const person = await this.people.findByEmail(attempt.email);
    const right = await verifyPassword(attempt.password, person?.passwordHash ?? null);
    if (!person || !right || person.state !== 'active') {
      await this.throttle.recordFailure(subjects);
      throw new DeskError('sign-in-refused', 'Check both and try again. An administrator can send a new invitation.');
    }
    await this.throttle.recordSuccess(subjects);
    await this.people.update(person.id, { lastSignInAt: timeText(this.clock) });
    await this.journal.write({
      actorId: person.id,
      action: 'signed-in',
      subjectKind: 'person',
      subjectId: person.id,
      summary: `${person.name} signed in`,
    });
    return toSignedIn(person);
  }

  /** The person of an open session; null when since closed. */
  async personOfSession(id: string): Promise<SignedInPerson | null> {
    const person = await this.people.findById(id);
    return person?.state === 'active' ? toSignedIn(person) : null;
  }
}

export function toSignedIn(person: PersonRecord): SignedInPerson {
  const { id, name, email, roles, partnerId } = person;
  return { id, name, email, roles, partnerId };
}
