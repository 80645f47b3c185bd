import type { components } from '../../../openapi/types/desk';
import type { Services } from '../compose';
import type { AskingKey } from '../estimates/estimates-service';
import type { SignedInPerson } from '../people/person';
import type { PartnerPart } from './asked-cases';
import type { Cast } from './cast';
import type { MovableClock } from './movable-clock';

type Specification = components['schemas']['Specification'];
type EstimatorNew = components['schemas']['EstimatorNew'];

/** One thing that somebody did, some days before this week's Monday at an hour of the day (UTC). */
export interface Step {
  readonly daysAgo: number;
  readonly at: string;
  act(): Promise<void>;
}

export interface FitScene {
  readonly slug: string;
  /** What later steps call the fit by. */
  readonly name: string;
  readonly revision: string;
  readonly specification: Specification;
}

export interface EditionScene {
  readonly slug: string;
  readonly name: string;
  readonly changeNote: string;
}

export const on = (daysAgo: number, at: string, act: () => Promise<void>): Step => ({ daysAgo, at, act });

/**
 * Where the demonstration is played: the real services, the people, and what was made so far under the names that later
 * steps call it by.
 */
export class Stage {
  readonly revisions = new Map<string, string>();
  readonly recordSets = new Map<string, string>();
  readonly fits = new Map<string, string>();
  readonly editions = new Map<string, string>();
  readonly keys = new Map<PartnerPart, AskingKey>();
  readonly keyTexts = new Map<PartnerPart, string>();
  /** Estimators that have an edition in force. */
  readonly published = new Set<string>();

  constructor(
    readonly services: Services,
    readonly clock: MovableClock,
    readonly cast: Cast,
    /** One hash for all. */
    readonly passwordHash: string,
  ) {}

  async nameEstimator(by: SignedInPerson, words: EstimatorNew): Promise<void> {
    await this.services.estimators.create(by, words);
  }

  /** Starts a fit and waits for its end; a demonstration with a failed fit would be none. */
  async fit(by: SignedInPerson, { slug, name, revision, specification }: FitScene): Promise<void> {
    const { fits } = this.services;
    const { id } = await fits.start(by, slug, { revisionId: required(this.revisions, revision), specification });
    const state = await fits.waitFor(id);
    if (state !== 'done') {
      const { failure } = await fits.read(id);
      throw new Error(`The demonstration's fit ${name} ended as ${state}: ${failure?.message ?? 'no reason given'}`);
    }
    this.fits.set(name, id);
  }

  /** A draft from the fit of the same name. */
  async drawUp(by: SignedInPerson, { slug, name, changeNote }: EditionScene): Promise<void> {
    const edition = await this.services.editions.drawUp(by, slug, { fitId: required(this.fits, name), changeNote });
    this.editions.set(name, edition.id);
  }

  async submit(by: SignedInPerson, name: string): Promise<void> {
    await this.services.editionReview.submit(by, required(this.editions, name));
  }

  async sendBack(by: SignedInPerson, name: string, note: string): Promise<void> {
    await this.services.editionReview.sendBack(by, required(this.editions, name), note);
  }

  async putInForce(by: SignedInPerson, slug: string, name: string): Promise<void> {
    await this.services.editionReview.putInForce(by, required(this.editions, name));
    this.published.add(slug);
  }
}

export function required<Value>(made: ReadonlyMap<string, Value>, name: string): Value {
  const value = made.get(name);
  if (value === undefined) throw new Error(`The demonstration has no ${name} yet.`);
  return value;
}
