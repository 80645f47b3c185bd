import busboy from 'busboy';
import type { Request } from 'express';
import { DeskError } from '../errors';
import { tooLarge, type KeptFiles, type ReceivedFile } from './kept-files';

export interface Upload {
  readonly file: ReceivedFile;
  readonly fileName: string;
  readonly fields: ReadonlyMap<string, string>;
}

/** Room for the boundaries and text fields around the file. */
const envelopeBytes = 64 * 1024;

function openForm(request: Request): busboy.Busboy {
  try {
    return busboy({
      headers: request.headers,
      defParamCharset: 'utf8',
      limits: { files: 1, fields: 20, fieldSize: 16 * 1024 },
    });
  } catch (error) {
    throw new DeskError('media-type-unsupported', 'Send the file as multipart/form-data.', { cause: error });
  }
}

/** An upload from which nothing has come for so long is broken off, so that it holds neither disk nor connection. */
const silentMs = 60_000;

/** The name alone: no folders, no control characters. */
export function plainFileName(name: string | undefined): string {
  const base = (name ?? '').split(/[\\/]/).pop() ?? '';
  const plain = base.replace(/[\u0000-\u001f\u007f]/g, '').trim();
  return (plain || 'records.csv').slice(-255);
}

/**
 * Receives a form with one file; its text fields may stand before or after it. When the client goes away or a part
 * is broken, nothing stays on disk.
 */
export async function receiveUpload(request: Request, files: KeptFiles, maximumBytes: number): Promise<Upload> {
  if (Number(request.headers['content-length'] ?? 0) > maximumBytes + envelopeBytes) throw tooLarge(maximumBytes);
  const form = openForm(request);
  const fields = new Map<string, string>();
  const goneAway = new AbortController();
  let fileName = '';
  let receiving: Promise<ReceivedFile> | null = null;
  const ended = new Promise<void>((resolve, reject) => {
    form.on('field', (name, value) => void fields.set(name, value));
    form.on('file', (name, stream, info) => {
      if (name !== 'file') {
        stream.resume();
        return;
      }
      fileName = plainFileName(info.filename);
      receiving = files.receive(stream, goneAway.signal);
      receiving.catch(reject);
    });
    form.once('close', resolve);
    form.once('error', (error) =>
      reject(new DeskError('body-unreadable', 'The form breaks off or is damaged. Send it again.', { cause: error })),
    );
    request.once('close', () => {
      if (!request.complete)
        reject(new DeskError('body-unreadable', 'The upload was broken off. Send the file again.'));
    });
    request.pipe(form);
  });
  request.setTimeout(silentMs, () => request.destroy());
  try {
    await ended;
    // What is done with the file may take longer, and the line is silent then.
    request.setTimeout(0);
  } catch (error) {
    request.unpipe(form);
    request.resume();
    goneAway.abort();
    await discard(receiving, files);
    throw error;
  }
  if (!receiving)
    throw new DeskError('file-missing', 'Add the file in the form’s field “file”.', {
      errors: [{ pointer: '#/file', detail: 'is missing' }],
    });
  return { file: await receiving, fileName, fields };
}

async function discard(receiving: Promise<ReceivedFile> | null, files: KeptFiles): Promise<void> {
  const file = await receiving?.catch(() => null);
  if (file) await files.remove(file.path);
}
