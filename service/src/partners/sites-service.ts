import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import { requireOwnPartner } from './own-partner';
import type { PartnersStore } from './partners-store';
import { siteOrigin } from './site-origin';
import type { SitesStore } from './sites-store';

type Site = components['schemas']['Site'];

export interface SitesServiceParts {
  readonly database: Database;
  readonly partners: PartnersStore;
  readonly sites: SitesStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

/** The sites that a partner's embed keys work from. */
export class SitesService {
  constructor(private readonly parts: SitesServiceParts) {}

  async add(partnerId: string, address: string, actor: SignedInPerson): Promise<Site> {
    const partnerName = await this.partnerName(partnerId, actor);
    const row = { id: newId(), partnerId, origin: siteOrigin(address), createdAt: timeText(this.parts.clock) };
    const taken = (): DeskError =>
      new DeskError('site-taken', `${row.origin} is listed for ${partnerName}. There is nothing to do.`);
    await this.parts.database.unitOfWork(async () => {
      await translateUnique(() => this.parts.sites.insert(row), 'partner_sites.origin', taken);
      await this.note('site-listed', partnerId, `${row.origin} listed for ${partnerName}`, actor);
    });
    return { id: row.id, origin: row.origin, createdAt: row.createdAt };
  }

  async remove(partnerId: string, siteId: string, actor: SignedInPerson): Promise<void> {
    const partnerName = await this.partnerName(partnerId, actor);
    await this.parts.database.unitOfWork(async () => {
      const site = await this.parts.sites.find(partnerId, siteId);
      if (!site) throw notFound('site');
      await this.parts.sites.remove(siteId);
      await this.note('site-removed', partnerId, `${site.origin} taken off the list of ${partnerName}`, actor);
    });
  }

  private async partnerName(partnerId: string, actor: SignedInPerson): Promise<string> {
    requireOwnPartner(actor, partnerId);
    const partner = await this.parts.partners.find(partnerId);
    if (!partner) throw notFound('partner');
    return partner.name;
  }

  private async note(action: string, subjectId: string, summary: string, actor: SignedInPerson): Promise<void> {
    await this.parts.journal.write({ actorId: actor.id, action, subjectKind: 'partner', subjectId, summary });
  }
}
