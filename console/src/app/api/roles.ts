import type { Role } from './contract';

/** Everyone who works at the desk, as against a partner's developer. */
export const DESK_ROLES: readonly Role[] = ['administrator', 'analyst', 'reviewer', 'viewer'];

export const ROLE_NAMES: Readonly<Record<Role, string>> = {
  administrator: 'Administrator',
  analyst: 'Analyst',
  reviewer: 'Reviewer',
  viewer: 'Viewer',
  'partner-developer': 'Partner developer',
};
