import type { Specification } from '../api/contract';

export type PenaltyRule = NonNullable<NonNullable<Specification['penalty']>['rule']>;
export type ValidationScheme = NonNullable<NonNullable<Specification['validation']>['scheme']>;
export type InputTransform = NonNullable<Specification['inputs'][number]['transform']>;
