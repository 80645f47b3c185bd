import type { Services } from '../compose';
import { toSignedIn } from '../people/sign-in-service';
import { writeNote, type DemonstrationNote } from './note';

/**
 * The sample page's origin follows `PARTNER_PAGE_PORT`; its embed key works only from listed sites. So a start with another
 * port lists the new origin. One that an administrator took off the list stays off while the port is the same.
 */
export async function listPartnerPage(services: Services, note: DemonstrationNote): Promise<DemonstrationNote> {
  const { people, partners, sites, config } = services;
  const { partnerPageUrl } = config;
  if (note.partnerPageUrl === partnerPageUrl) return note;
  const administrator = await people.findByEmail(note.administratorEmail);
  if (!administrator) return note;
  const actor = toSignedIn(administrator);
  const partner = await partners.read(note.embedPartnerId, actor);
  if (!partner.sites.some((site) => site.origin === partnerPageUrl)) await sites.add(partner.id, partnerPageUrl, actor);
  const moved = { ...note, partnerPageUrl };
  writeNote(config.dataFolder, moved);
  return moved;
}
