import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { Page } from '../http/page';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import { requireOwnPartner } from './own-partner';
import type { PartnerRow, PartnersStore } from './partners-store';
import type { SitesStore } from './sites-store';

type Key = components['schemas']['Key'];
type Partner = components['schemas']['Partner'];
type PartnerList = components['schemas']['PartnerList'];
type PartnerNew = components['schemas']['PartnerNew'];
type PartnerChange = components['schemas']['PartnerChange'];

export interface PartnersServiceParts {
  readonly database: Database;
  readonly partners: PartnersStore;
  readonly sites: SitesStore;
  readonly keys: { listOfPartner(partnerId: string): Promise<Key[]> };
  readonly journal: Journal;
  readonly clock: Clock;
}

const nameTaken = (): DeskError =>
  new DeskError('name-taken', 'Another partner has this name. Take another, or change that entry.', {
    errors: [{ pointer: '#/name', detail: 'is in use' }],
  });

export class PartnersService {
  constructor(private readonly parts: PartnersServiceParts) {}

  async list(page: Page): Promise<PartnerList> {
    const { partners, clock } = this.parts;
    return { items: await partners.list(page, timeText(clock)), total: await partners.count() };
  }

  async create(entry: PartnerNew, actor: SignedInPerson): Promise<Partner> {
    const row = {
      id: newId(),
      name: entry.name.trim(),
      contactEmail: entry.contactEmail,
      createdAt: timeText(this.parts.clock),
      createdBy: actor.id,
    };
    await this.parts.database.unitOfWork(async () => {
      await translateUnique(() => this.parts.partners.insert(row), 'partners.name_key', nameTaken);
      await this.note('partner-entered', row.id, `${row.name} entered as a partner`, actor);
    });
    return this.answer(await this.existing(row.id));
  }

  async read(id: string, person: SignedInPerson): Promise<Partner> {
    requireOwnPartner(person, id);
    return this.answer(await this.existing(id));
  }

  async change(id: string, change: PartnerChange, actor: SignedInPerson): Promise<Partner> {
    await this.parts.database.unitOfWork(async () => {
      const before = await this.existing(id);
      const name = change.name?.trim() ?? before.name;
      const contactEmail = change.contactEmail ?? before.contactEmail;
      await translateUnique(
        () => this.parts.partners.update(id, { name, contactEmail }),
        'partners.name_key',
        nameTaken,
      );
      const parts = [
        name === before.name ? null : `renamed from ${before.name}`,
        contactEmail === before.contactEmail ? null : `contact ${contactEmail}`,
      ];
      await this.note(
        'partner-changed',
        id,
        `${name}: ${parts.filter((part) => part !== null).join('; ') || 'nothing changed'}`,
        actor,
      );
    });
    return this.answer(await this.existing(id));
  }

  private async existing(id: string): Promise<PartnerRow> {
    const partner = await this.parts.partners.find(id);
    if (!partner) throw notFound('partner');
    return partner;
  }

  private async answer({ id, name, contactEmail, createdAt }: PartnerRow): Promise<Partner> {
    const sites = await this.parts.sites.listOfPartner(id);
    return {
      id,
      name,
      contactEmail,
      createdAt,
      estimateCount: await this.parts.partners.estimateCount(id),
      sites: sites.map((site) => ({ id: site.id, origin: site.origin, createdAt: site.createdAt })),
      keys: await this.parts.keys.listOfPartner(id),
    };
  }

  private async note(action: string, subjectId: string, summary: string, actor: SignedInPerson): Promise<void> {
    await this.parts.journal.write({ actorId: actor.id, action, subjectKind: 'partner', subjectId, summary });
  }
}
