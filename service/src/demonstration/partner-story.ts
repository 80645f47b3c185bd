import type { components } from '../../../openapi/types/desk';
import { enterPerson } from './cast';
import type { PartnerPart } from './asked-cases';
import { on, type Stage, type Step } from './stage';

type KeyNew = components['schemas']['KeyNew'];

interface PartnerScene {
  readonly part: PartnerPart;
  readonly name: string;
  readonly contactEmail: string;
  readonly developer: { readonly name: string; readonly email: string };
  readonly sites: readonly string[];
  readonly key: KeyNew;
}

async function enterPartner(stage: Stage, scene: PartnerScene): Promise<void> {
  const { services, cast, clock, passwordHash } = stage;
  const partner = await services.partners.create(
    { name: scene.name, contactEmail: scene.contactEmail },
    cast.administrator,
  );
  await enterPerson(
    { ...services, clock, passwordHash },
    { ...scene.developer, role: 'partner-developer' },
    partner.id,
  );
  for (const site of scene.sites) await services.sites.add(partner.id, site, cast.administrator);
  const issued = await services.keys.issue(cast.administrator, partner.id, scene.key);
  stage.keyTexts.set(scene.part, issued.key);
  const { estimators, monthlyQuota } = issued.details;
  stage.keys.set(scene.part, {
    id: issued.id,
    partnerId: partner.id,
    allEstimators: estimators === 'all',
    monthlyQuota,
  });
}

const northquay: PartnerScene = {
  part: 'northquay',
  name: 'Northquay Moorings',
  contactEmail: 'office@northquay.example',
  developer: { name: 'Petra Lunn', email: 'petra.lunn@northquay.example' },
  sites: [],
  key: { kind: 'partner', label: 'Booking server', estimators: 'all', perMinute: 120, monthlyQuota: 20_000 },
};

const pellTarn: PartnerScene = {
  part: 'pellTarn',
  name: 'Pell & Tarn Brokers',
  contactEmail: 'desk@pelltarn.example',
  developer: { name: 'Sam Orrell', email: 'sam.orrell@pelltarn.example' },
  sites: ['https://www.pelltarn.example'],
  key: {
    kind: 'embed',
    label: 'Form on the boats’ pages',
    estimators: ['refit-labour'],
    perMinute: 60,
    monthlyQuota: 5000,
  },
};

const outerShoal: PartnerScene = {
  part: 'outerShoal',
  name: 'Outer Shoal Insurance Mutual',
  contactEmail: 'claims@outershoal.example',
  developer: { name: 'Dara Finch', email: 'dara.finch@outershoal.example' },
  sites: [],
  key: {
    kind: 'partner',
    label: 'Monthly portfolio',
    estimators: ['refit-labour'],
    perMinute: 600,
    monthlyQuota: 2000,
  },
};

/** A server that calls, a page that embeds, a portfolio that comes in batches. */
export function partnerSteps(stage: Stage, partnerPageUrl: string): Step[] {
  return [
    on(405, '10:50', () => enterPartner(stage, northquay)),
    on(350, '14:15', () => enterPartner(stage, { ...pellTarn, sites: [...pellTarn.sites, partnerPageUrl] })),
    on(333, '09:00', () => enterPartner(stage, outerShoal)),
  ];
}
