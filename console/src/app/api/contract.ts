/** The contract's shapes under the names that screens use. Nothing here is written by hand: see openapi/. */
import type { components, operations } from '@contract/desk';

type Schemas = components['schemas'];

export type Session = Schemas['Session'];
export type SessionPerson = Schemas['SessionPerson'];
export type SignIn = Schemas['SignIn'];
export type Role = Schemas['Role'];

export type ProblemDetails = Schemas['Problem'];
export type ProblemCode = Schemas['ProblemCode'];

export type RecordSet = Schemas['RecordSet'];
export type RecordSetDetail = Schemas['RecordSetDetail'];
export type RecordSetList = Schemas['RecordSetList'];
export type RecordSetSummary = Schemas['RecordSetSummary'];
export type RecordRevision = Schemas['RecordRevision'];
export type RevisionSummary = Schemas['RevisionSummary'];
export type RevisionReference = Schemas['RevisionReference'];
export type RecordColumn = Schemas['RecordRevision']['columns'][number];
export type ColumnKind = RecordColumn['kind'];
export type Histogram = NonNullable<RecordColumn['histogram']>;
export type RecordRows = Schemas['RecordRows'];
export type RecordFindings = Schemas['RecordFindings'];
export type Finding = Schemas['Finding'];
export type MendStep = Schemas['MendStep'];
export type MendingTrial = Schemas['MendingTrial'];
export type MendingDraft = Schemas['MendingDraft'];
export type IncomingFile = Schemas['IncomingFile'];
export type ReadingChoices = Schemas['ReadingChoices'];
export type ColumnChoice = Schemas['ColumnChoice'];
export type ReadingProposal = Schemas['ReadingProposal'];
export type ProposedColumn = Schemas['ProposedColumn'];
export type DateOrder = Schemas['DateOrder'];
export type BringInRequest = Schemas['BringInRequest'];
export type RecordTask = Schemas['RecordTask'];
export type RecordSetChange = Schemas['RecordSetChange'];
export type Correlations = Schemas['Correlations'];
export type Scatter = Schemas['Scatter'];
export type RevisionComparison = Schemas['RevisionComparison'];
export type ColumnComparison = Schemas['ColumnComparison'];
export type RevisionDeletion = Schemas['RevisionDeletion'];

export type Estimator = Schemas['Estimator'];
export type EstimatorList = Schemas['EstimatorList'];
export type EstimatorNew = Schemas['EstimatorNew'];
export type EstimatorChange = Schemas['EstimatorChange'];

export type Fit = Schemas['Fit'];
export type FitList = Schemas['FitList'];
export type FitSummary = Schemas['FitSummary'];
export type FitNew = Schemas['FitNew'];
export type FitAccepted = Schemas['FitAccepted'];
export type FitState = Schemas['FitState'];
export type FitProgressEvent = Schemas['FitProgressEvent'];
export type FitResult = Schemas['FitResult'];
export type PathPoint = Schemas['PathPoint'];
export type Progress = Schemas['Progress'];
export type Method = Schemas['Method'];
export type Specification = Schemas['Specification'];
export type SpecificationInput = Schemas['SpecificationInput'];
export type Weight = Schemas['Weight'];

export type Edition = Schemas['Edition'];
export type EditionList = Schemas['EditionList'];
export type EditionSummary = Schemas['EditionSummary'];
export type EditionState = Schemas['EditionState'];
export type EditionNew = Schemas['EditionNew'];
export type EditionEvent = Schemas['EditionEvent'];
export type Withdrawal = Schemas['Withdrawal'];

export type Evaluation = Schemas['Evaluation'];
export type Contribution = Schemas['Contribution'];
export type Flag = Schemas['Flag'];
export type Inputs = Schemas['Inputs'];
export type InputSchema = Schemas['InputSchema'];
export type Interval = Schemas['Interval'];
export type EstimateList = Schemas['EstimateList'];
export type EstimateSummary = Schemas['EstimateSummary'];
export type EstimateRecord = Schemas['EstimateRecord'];

export type Partner = Schemas['Partner'];
export type PartnerList = Schemas['PartnerList'];
export type PartnerSummary = Schemas['PartnerSummary'];
export type PartnerNew = Schemas['PartnerNew'];
export type PartnerChange = Schemas['PartnerChange'];
export type Site = Schemas['Site'];
export type Key = Schemas['Key'];
export type KeyKind = Schemas['KeyKind'];
export type KeyNew = Schemas['KeyNew'];
export type KeyIssued = Schemas['KeyIssued'];

export type Person = Schemas['Person'];
export type PersonList = Schemas['PersonList'];
export type PersonReference = Schemas['PersonReference'];
export type PersonChange = Schemas['PersonChange'];
export type Invite = Schemas['Invite'];
export type Invited = Schemas['Invited'];
export type Invitation = Schemas['Invitation'];

export type DeskOverview = Schemas['DeskOverview'];
export type FitUnderWay = DeskOverview['fitsUnderWay'][number];
export type JournalEntry = Schemas['JournalEntry'];
export type JournalPage = Schemas['JournalPage'];
export type JournalFilter = NonNullable<operations['listJournal']['parameters']['query']>;
export type Settings = Schemas['Settings'];
export type SettingsChange = Schemas['SettingsChange'];
