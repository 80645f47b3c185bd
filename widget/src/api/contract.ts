import type { components } from '@contract/partner';

type Schemas = components['schemas'];

export type PublishedEstimator = Schemas['PublishedEstimator'];
export type InputSchema = Schemas['InputSchema'];
export type Inputs = Schemas['Inputs'];
export type Estimate = Schemas['Estimate'];
export type Flag = Schemas['Flag'];
export type Problem = Schemas['Problem'];
export type ProblemCode = Schemas['ProblemCode'];
