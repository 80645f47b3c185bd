import type { RequestHandler } from 'express';
import type { operations } from '../../../openapi/types/partner';
import { DeskError } from '../errors';
import type { KeyKind } from './key-text';
import { partnerKeyOf } from './partner-key';

export type PartnerOperation = keyof operations & string;

/** Which kinds of key may call what: the only table of it. */
const kindsOf: Readonly<Record<PartnerOperation, readonly KeyKind[]>> = {
  listPublishedEstimators: ['partner', 'embed'],
  describeEstimator: ['partner', 'embed'],
  createEstimate: ['partner', 'embed'],
  readOwnEstimate: ['partner'],
};

/** An operation missing from the table is refused to every key. */
export function keyGuard(operationId: string): RequestHandler {
  const kinds = kindsOf[operationId as PartnerOperation] ?? [];
  return (request, _response, next) => {
    const { kind } = partnerKeyOf(request);
    if (kinds.includes(kind)) return next();
    return next(
      new DeskError(
        'key-out-of-scope',
        'An embed key may describe estimators and ask for estimates. Use a partner key from your server for this.',
      ),
    );
  };
}
