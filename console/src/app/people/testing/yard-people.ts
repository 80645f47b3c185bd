import type { Person } from '../../api/contract';

/** Invented people of the demonstration's desk, for specs. */

export const ines: Person = {
  id: 'person00ines',
  name: 'Ines Caldwell',
  email: 'ines@marlbay.example',
  roles: ['administrator', 'analyst'],
  partnerId: null,
  state: 'active',
  createdAt: '2026-01-12T09:10:00Z',
  lastSignInAt: '2026-12-01T08:02:00Z',
};

export const odile: Person = {
  ...ines,
  id: 'person0odile',
  name: 'Odile Marsh',
  email: 'odile@marlbay.example',
  roles: ['viewer'],
  state: 'invited',
  lastSignInAt: null,
};

export const greta: Person = {
  ...ines,
  id: 'person0greta',
  name: 'Greta Hollin',
  email: 'greta@marlbay.example',
  roles: ['reviewer'],
  state: 'closed',
};

export const bram: Person = {
  ...ines,
  id: 'person00bram',
  name: 'Bram Pell',
  email: 'bram@pellandtarn.example',
  roles: ['partner-developer'],
  partnerId: 'partner0pell',
};
