import { CompiledEditions } from './editions/compiled-editions';
import { EditionReview } from './editions/edition-review';
import { EditionsService, type EditionsParts } from './editions/editions-service';
import { EstimateTraces } from './estimates/estimate-traces';
import { EstimatesService } from './estimates/estimates-service';
import { EstimatesStore } from './estimates/estimates-store';
import { PublishedEstimators } from './estimates/published-estimators';
import { PublishedStore } from './estimates/published-store';

export interface EditionsRoom {
  readonly editions: EditionsService;
  readonly editionReview: EditionReview;
  readonly publishedEstimators: PublishedEstimators;
  readonly estimates: EstimatesService;
  readonly estimateTraces: EstimateTraces;
}

/** The part of the composition that belongs to editions and to what they answer. */
export function composeEditions(given: Omit<EditionsParts, 'compiled'>): EditionsRoom {
  const compiled = new CompiledEditions(given.editions);
  const publishedEstimators = new PublishedEstimators(new PublishedStore(given.database));
  const estimates = new EstimatesStore(given.database);
  return {
    editions: new EditionsService({ ...given, compiled }),
    editionReview: new EditionReview(given),
    publishedEstimators,
    estimates: new EstimatesService({ ...given, estimates, published: publishedEstimators, compiled }),
    estimateTraces: new EstimateTraces(estimates),
  };
}
