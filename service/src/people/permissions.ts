import type { operations } from '../../../openapi/types/desk';
import type { Role } from './person';

export type DeskOperation = keyof operations & string;

/** `public`: no session needed. `signed-in`: any role. Otherwise one of the roles listed. */
export type Access = 'public' | 'signed-in' | readonly Role[];

const desk: readonly Role[] = ['administrator', 'analyst', 'reviewer', 'viewer'];
const administrator: readonly Role[] = ['administrator'];
const analyst: readonly Role[] = ['analyst'];
const reviewer: readonly Role[] = ['reviewer'];
const partnerSide: readonly Role[] = ['administrator', 'partner-developer'];

/** Who may call what: the only table of rights. A partner developer reaches their own partner only (partners-service). */
export const permissions: Readonly<Record<DeskOperation, Access>> = {
  readSession: 'signed-in',
  signIn: 'public',
  signOut: 'signed-in',
  readHealth: 'public',
  listPeople: administrator,
  invitePerson: administrator,
  changePerson: administrator,
  readInvitation: 'public',
  acceptInvitation: 'public',
  listRecordSets: desk,
  createRecordSet: analyst,
  readRecordSet: desk,
  createRevision: analyst,
  readRevision: desk,
  listRevisionRows: desk,
  listRevisionFindings: desk,
  mendRevision: analyst,
  readRevisionOriginal: desk,
  changeRecordSet: analyst,
  deleteRevision: analyst,
  readRevisionDeletion: analyst,
  exportRevision: desk,
  tryMending: analyst,
  readMendingDraft: analyst,
  keepMendingDraft: analyst,
  readCorrelations: desk,
  readScatter: desk,
  compareRevisions: desk,
  receiveFile: analyst,
  readIncomingFile: analyst,
  discardIncomingFile: analyst,
  proposeReading: analyst,
  bringInFile: analyst,
  readRecordTask: analyst,
  cancelRecordTask: analyst,
  listEstimators: [...desk, 'partner-developer'],
  createEstimator: analyst,
  readEstimator: desk,
  changeEstimator: analyst,
  listFits: desk,
  startFit: analyst,
  readFit: desk,
  followFit: desk,
  cancelFit: analyst,
  listEditions: desk,
  createEdition: analyst,
  readEdition: desk,
  submitEdition: analyst,
  putEditionInForce: reviewer,
  sendEditionBack: reviewer,
  withdrawEdition: reviewer,
  tryCase: desk,
  listEstimates: desk,
  readEstimate: desk,
  listPartners: desk,
  createPartner: administrator,
  readPartner: [...desk, 'partner-developer'],
  changePartner: administrator,
  addSite: partnerSide,
  removeSite: partnerSide,
  issueKey: partnerSide,
  revokeKey: partnerSide,
  readDesk: desk,
  listJournal: administrator,
  readSettings: desk,
  changeSettings: administrator,
};
