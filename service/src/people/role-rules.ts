import { DeskError } from '../errors';
import type { Role } from './person';

const invalid = (pointer: string, detail: string): DeskError =>
  new DeskError('request-invalid', detail, { errors: [{ pointer, detail }] });

/** A partner developer belongs to one partner and holds no desk role; desk people belong to none. */
export function requireRolesFit(roles: readonly Role[], partnerId: string | null): void {
  const developer = roles.includes('partner-developer');
  if (developer && roles.length > 1)
    throw invalid(
      '#/roles',
      'A partner developer holds no desk role. Invite under another e-mail address for desk work.',
    );
  if (developer && partnerId === null) throw invalid('#/partnerId', 'Name the partner that the developer belongs to.');
  if (!developer && partnerId !== null)
    throw invalid('#/roles', 'Someone who belongs to a partner can be a partner developer only.');
}

export const unknownPartner = (): DeskError =>
  invalid('#/partnerId', 'There is no such partner. Enter the partner first.');
