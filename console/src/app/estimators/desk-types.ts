import type { components } from '../../../../openapi/types/desk';

type Schemas = components['schemas'];

export type Estimator = Schemas['Estimator'];
export type Edition = Schemas['Edition'];
export type EditionState = Schemas['EditionState'];
export type EditionSummary = Schemas['EditionSummary'];
export type EstimateSummary = Schemas['EstimateSummary'];
export type Evaluation = Schemas['Evaluation'];
export type Contribution = Schemas['Contribution'];
export type Inputs = Schemas['Inputs'];
export type Fit = Schemas['Fit'];
export type FitNew = Schemas['FitNew'];
export type FitResult = Schemas['FitResult'];
export type FitState = Schemas['FitState'];
export type FitSummary = Schemas['FitSummary'];
export type PathPoint = Schemas['PathPoint'];
export type Progress = Schemas['Progress'];
export type Weight = Schemas['Weight'];
export type Specification = Schemas['Specification'];
export type SpecificationInput = Schemas['SpecificationInput'];
export type Method = Schemas['Method'];
export type PenaltyRule = NonNullable<NonNullable<Specification['penalty']>['rule']>;
export type ValidationScheme = NonNullable<NonNullable<Specification['validation']>['scheme']>;
export type RecordColumn = Schemas['RecordColumn'];
export type RecordRevision = Schemas['RecordRevision'];
