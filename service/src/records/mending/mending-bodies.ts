import express, { type RequestHandler } from 'express';
import { DeskError } from '../../errors';

/** Addresses to which steps are sent, below that of the desk's API. */
export const mendingAddresses = ['mended-revisions', 'mending-trial', 'mending-draft'].map(
  (what) => `/record-revisions/:id/${what}`,
);

const megabytes = 8;
const parse = express.json({ limit: megabytes * 1024 * 1024 });

/** Steps may list 100,000 rows each, which other bodies need not: several such lists fit. */
export const mendingBodies: RequestHandler = (request, response, next) =>
  parse(request, response, (error?: unknown) => {
    const isTooLarge = (error as { readonly status?: unknown } | undefined)?.status === 413;
    const detail = `The steps are larger than ${megabytes} MB. Name rows by a condition instead of listing them, or mend in several goes.`;
    next(isTooLarge ? new DeskError('body-too-large', detail, { cause: error }) : error);
  });
