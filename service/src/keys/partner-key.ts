import type { Request } from 'express';
import { DeskError } from '../errors';
import type { KeyKind } from './key-text';

/** The key that a call of the partner API came with, after it has been recognised. */
export interface PartnerKey {
  /** Of its row: what limits and logs are told, never the key itself. */
  readonly id: string;
  readonly kind: KeyKind;
  readonly partnerId: string;
  readonly allEstimators: boolean;
  readonly perMinute: number;
  readonly monthlyQuota: number | null;
}

declare module 'express-serve-static-core' {
  interface Request {
    partnerKey?: PartnerKey;
  }
}

export function partnerKeyOf(request: Request): PartnerKey {
  if (!request.partnerKey) throw new DeskError('key-missing', 'Send your key in the header X-Api-Key.');
  return request.partnerKey;
}
