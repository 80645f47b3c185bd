import { createHash, randomBytes } from 'node:crypto';
import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { Journal } from '../journal/journal';
import type { MailService } from '../mail/mail-service';
import type { Settings } from '../settings/settings';
import { invitationLetter } from './invitation-letter';
import type { InvitationRow, InvitationsStore } from './invitations-store';
import { hashPassword } from './password';
import { requireStrongPassword } from './password-strength';
import type { PeopleStore } from './people-store';
import { toPerson } from './person-answer';
import type { PersonRecord, SignedInPerson } from './person';
import { requireRolesFit, unknownPartner } from './role-rules';

type Invite = components['schemas']['Invite'];
type Invited = components['schemas']['Invited'];
type Invitation = components['schemas']['Invitation'];

const validMs = 7 * 24 * 60 * 60 * 1000;
const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');
const emailTaken = (email: string): DeskError =>
  new DeskError('email-taken', `Someone is entered with ${email}. Change that entry instead.`, {
    errors: [{ pointer: '#/email', detail: 'is entered already' }],
  });
const spent = (): DeskError => new DeskError('invitation-spent', 'Ask an administrator for a new invitation.');

export interface InvitationServiceParts {
  readonly database: Database;
  readonly people: PeopleStore;
  readonly invitations: InvitationsStore;
  readonly journal: Journal;
  readonly mail: MailService;
  readonly settings: Settings;
  readonly clock: Clock;
  readonly publicUrl: string;
}

interface OpenInvitation {
  readonly invitation: InvitationRow;
  readonly person: PersonRecord;
}

export class InvitationService {
  constructor(private readonly parts: InvitationServiceParts) {}

  /** Someone new, someone invited before, or someone closed; whoever is active is refused. The token is kept as a hash. */
  async invite(invite: Invite, actor: SignedInPerson): Promise<Invited> {
    requireRolesFit(invite.roles, invite.partnerId ?? null);
    const token = randomBytes(32).toString('base64url');
    const { person, expiresAt } = await this.parts.database.unitOfWork(async () => {
      const entered = await this.enter(invite);
      const invitation = await this.replaceInvitation(entered.id, token);
      await this.parts.journal.write({
        actorId: actor.id,
        action: 'person-invited',
        subjectKind: 'person',
        subjectId: entered.id,
        summary: `${entered.name} invited as ${entered.roles.join(', ')}`,
      });
      return { person: entered, expiresAt: invitation.expiresAt };
    });
    const invitationUrl = `${this.parts.publicUrl}/invitations/${token}`;
    const { deskName } = await this.parts.settings.read();
    const mailSent = await this.parts.mail.send(
      invitationLetter({
        name: person.name,
        email: person.email,
        invitedBy: actor.name,
        deskName,
        url: invitationUrl,
        expiresAt,
      }),
    );
    return { person: toPerson(person), invitationUrl, expiresAt, mailSent };
  }

  async read(token: string): Promise<Invitation> {
    const { invitation, person } = await this.openInvitation(token);
    return { name: person.name, email: person.email, expiresAt: invitation.expiresAt };
  }

  /** Sets the password and opens the person. Works once. */
  async accept(token: string, password: string): Promise<void> {
    const { invitation, person } = await this.openInvitation(token);
    requireStrongPassword(password, person);
    const passwordHash = await hashPassword(password);
    await this.parts.database.unitOfWork(async () => {
      if (!(await this.parts.invitations.spend(invitation.id, timeText(this.parts.clock)))) throw spent();
      await this.parts.people.update(person.id, { passwordHash, state: 'active' });
      await this.parts.journal.write({
        actorId: person.id,
        action: 'invitation-accepted',
        subjectKind: 'person',
        subjectId: person.id,
        summary: `${person.name} accepted the invitation and set a password`,
      });
    });
  }

  private async openInvitation(token: string): Promise<OpenInvitation> {
    const invitation = await this.parts.invitations.findByTokenHash(hashOf(token));
    if (!invitation) throw notFound('invitation');
    const person = await this.parts.people.findById(invitation.personId);
    const ended = invitation.spentAt !== null || invitation.expiresAt <= timeText(this.parts.clock);
    if (!person || ended || person.state !== 'invited') throw spent();
    return { invitation, person };
  }

  private async enter(invite: Invite): Promise<PersonRecord> {
    const { people } = this.parts;
    const partnerId = invite.partnerId ?? null;
    if (partnerId !== null && !(await people.partnerExists(partnerId))) throw unknownPartner();
    const known = await people.findByEmail(invite.email);
    if (known?.state === 'active') throw emailTaken(invite.email);
    const id = known?.id ?? newId();
    const columns = {
      name: invite.name.trim(),
      email: invite.email.trim(),
      partnerId,
      state: 'invited',
      passwordHash: null,
    } as const;
    if (known) {
      await people.update(id, columns);
      await people.replaceRoles(id, invite.roles);
    } else {
      const person = { id, ...columns, roles: invite.roles, createdAt: timeText(this.parts.clock) };
      await translateUnique(
        () => people.insert(person),
        'people.email_key',
        () => emailTaken(invite.email),
      );
    }
    return (await people.findById(id)) as PersonRecord;
  }

  private async replaceInvitation(personId: string, token: string): Promise<InvitationRow> {
    const { invitations, clock } = this.parts;
    const createdAt = timeText(clock);
    const expiresAt = new Date(clock.now().getTime() + validMs).toISOString();
    await invitations.spendAllOf(personId, createdAt);
    const row = { id: newId(), personId, tokenHash: hashOf(token), expiresAt, spentAt: null, createdAt };
    await invitations.insert(row);
    return row;
  }
}
