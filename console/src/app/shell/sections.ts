import type { Role } from '../api/contract';
import { DESK_ROLES } from '../api/roles';

export interface Section {
  readonly label: string;
  readonly path: string;
  readonly roles: readonly Role[];
}

/** The sections in the order of the top band, and who may use each. */
export const SECTIONS = {
  desk: { label: 'Desk', path: 'desk', roles: DESK_ROLES },
  records: { label: 'Records', path: 'records', roles: DESK_ROLES },
  estimators: { label: 'Estimators', path: 'estimators', roles: DESK_ROLES },
  partners: { label: 'Partners', path: 'partners', roles: DESK_ROLES },
  people: { label: 'People', path: 'people', roles: ['administrator'] },
  journal: { label: 'Journal', path: 'journal', roles: ['administrator'] },
  settings: { label: 'Settings', path: 'settings', roles: DESK_ROLES },
  partnerArea: { label: 'Partner area', path: 'partner-area', roles: ['partner-developer'] },
} as const satisfies Record<string, Section>;

export const SECTION_LIST: readonly Section[] = Object.values(SECTIONS);
