import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Response } from 'express';

export interface Download {
  readonly fileName: string;
  readonly type: string;
  /** When it is known beforehand. */
  readonly byteCount?: number;
  readonly bytes: Readable;
}

/**
 * Answers with a file to be kept. Always a download: what somebody sent must never be shown as a page of ours. Whoever
 * goes away before its end leaves nobody to tell, so that is no error; the stream is destroyed.
 */
export async function sendDownload(response: Response, { fileName, type, byteCount, bytes }: Download): Promise<void> {
  response.attachment(fileName).type(type).setHeader('X-Content-Type-Options', 'nosniff');
  if (byteCount !== undefined) response.setHeader('Content-Length', byteCount);
  try {
    await pipeline(bytes, response);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error;
  }
}
