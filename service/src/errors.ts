import type { components } from '../../openapi/types/desk';

export type ProblemCode = components['schemas']['ProblemCode'];

interface ProblemKind {
  readonly status: number;
  readonly title: string;
}

/** Status and title of every problem; the contract lists the same codes. */
export const problemKinds: Readonly<Record<ProblemCode, ProblemKind>> = {
  'request-invalid': { status: 400, title: 'The request does not fit the contract' },
  'body-unreadable': { status: 400, title: 'The body could not be read' },
  'body-too-large': { status: 413, title: 'The body is too large' },
  'media-type-unsupported': { status: 415, title: 'The body has another media type than the contract asks for' },
  'not-found': { status: 404, title: 'There is nothing at this address' },
  'method-not-allowed': { status: 405, title: 'This address does not take that method' },
  'sign-in-required': { status: 401, title: 'Sign in first' },
  'sign-in-refused': { status: 401, title: 'The e-mail address or the password is wrong' },
  'sign-in-throttled': { status: 429, title: 'Too many attempts to sign in' },
  'not-permitted': { status: 403, title: 'Your roles do not permit this' },
  'request-forged': { status: 403, title: 'The request does not carry the guard’s header' },
  'invitation-spent': { status: 410, title: 'The invitation has been used or has run out' },
  'password-too-weak': { status: 422, title: 'The password is too easy to guess' },
  'email-taken': { status: 409, title: 'Someone with this e-mail address is entered already' },
  'last-administrator': { status: 409, title: 'The desk would be left without an administrator' },
  'file-missing': { status: 400, title: 'No file came with the form' },
  'file-not-table': { status: 422, title: 'The file is not a table of text' },
  'file-encoding': { status: 422, title: 'The file is not UTF-8 text' },
  'file-ragged': { status: 422, title: 'The rows do not all have the same number of cells' },
  'file-header': { status: 422, title: 'The header line cannot be used' },
  'file-empty': { status: 422, title: 'The file has no rows' },
  'file-too-large': { status: 413, title: 'The file is too large' },
  'file-protected': { status: 422, title: 'The file is protected by a password' },
  'file-sheet': { status: 422, title: 'The workbook has no such sheet' },
  'choices-invalid': { status: 422, title: 'The choices do not fit the file' },
  'columns-differ': { status: 422, title: 'The file’s columns are not those of the revision' },
  'record-set-changed': { status: 409, title: 'Somebody has changed the record set since you read it' },
  'revision-in-use': { status: 409, title: 'The revision is in use' },
  'original-not-kept': { status: 410, title: 'The original file was not kept' },
  'records-erased': { status: 410, title: 'The rows have been erased' },
  'task-ended': { status: 409, title: 'The work has ended already' },
  'storage-full': { status: 507, title: 'There is no room left for the file' },
  'name-taken': { status: 409, title: 'The name is in use' },
  'slug-taken': { status: 409, title: 'The public name is in use' },
  'specification-invalid': { status: 422, title: 'The specification does not fit the records' },
  'fit-failed': { status: 422, title: 'The fit could not be computed' },
  'fit-not-done': { status: 409, title: 'The fit is not done' },
  'fit-ended': { status: 409, title: 'The fit has ended already' },
  'edition-state': { status: 409, title: 'The edition is not in a state for this' },
  'own-edition': { status: 403, title: 'Another person must put the edition in force' },
  'site-invalid': { status: 422, title: 'The site’s address cannot be used' },
  'site-taken': { status: 409, title: 'The site is listed already' },
  'estimator-unknown': { status: 422, title: 'There is no estimator of that name' },
  'edition-unknown': { status: 404, title: 'There is no such edition' },
  'nothing-in-force': { status: 409, title: 'No edition of this estimator is in force' },
  'edition-withdrawn': { status: 410, title: 'The edition has been withdrawn' },
  'key-missing': { status: 401, title: 'Send your key in the header X-Api-Key' },
  'key-malformed': { status: 401, title: 'This is not a key' },
  'key-refused': { status: 401, title: 'The key is not known' },
  'key-revoked': { status: 401, title: 'The key has been revoked' },
  'key-expired': { status: 401, title: 'The key has run out' },
  'key-out-of-scope': { status: 403, title: 'The key does not cover this' },
  'site-not-listed': { status: 403, title: 'The key does not work from this site' },
  'rate-exceeded': { status: 429, title: 'Too many calls in a minute' },
  'quota-exceeded': { status: 429, title: 'The month’s estimates are used up' },
  'inputs-invalid': { status: 422, title: 'The case does not fit the estimator’s inputs' },
  unavailable: { status: 503, title: 'The service cannot answer just now' },
  internal: { status: 500, title: 'The service failed' },
};

export interface PointedError {
  readonly detail: string;
  readonly pointer: string;
}

export interface ProblemDetails {
  readonly errors?: readonly PointedError[];
  readonly line?: number;
  readonly retryAfter?: number;
  readonly cause?: unknown;
}

/** The only error that the service throws on purpose. `detail` says what happened and what to do. */
export class DeskError extends Error {
  readonly status: number;
  readonly title: string;

  constructor(
    readonly code: ProblemCode,
    readonly detail: string,
    readonly more: ProblemDetails = {},
  ) {
    super(detail, { cause: more.cause });
    this.name = 'DeskError';
    this.status = problemKinds[code].status;
    this.title = problemKinds[code].title;
  }
}

export const notFound = (what: string): DeskError =>
  new DeskError('not-found', `There is no ${what} with that name or number. Check the address.`);
