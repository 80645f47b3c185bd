import { createReadStream } from 'node:fs';
import { open } from 'node:fs/promises';
import { TableProblem } from '../table-problem';
import { readZipDirectory, ZipDamaged, type ZipEntry } from './zip-directory';

const zipStart = Buffer.from([0x50, 0x4b, 3, 4]);
const compoundStart = Buffer.from([0xd0, 0xcf, 0x11, 0xe0]);

/** Stream of a workbook under a password (Microsoft, [MS-OFFCRYPTO] section 2.3.4.4), as compound files name theirs. */
const encryptedPackage = Buffer.from('EncryptedPackage', 'utf16le');

const protectedWorkbook = (): TableProblem =>
  new TableProblem(
    'file-protected',
    'The workbook is protected by a password. Open it, save it without the password, and send it again.',
  );

export const damagedWorkbook = (cause: string): TableProblem =>
  new TableProblem('file-not-table', `The workbook ${cause}. Open it, save it again, and send the whole file.`);

async function beginsWith(path: string, start: Buffer): Promise<boolean> {
  const file = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(start.length), 0, start.length, 0);
    return bytesRead === start.length && buffer.equals(start);
  } finally {
    await file.close();
  }
}

async function contains(path: string, wanted: Buffer): Promise<boolean> {
  let carried: Buffer = Buffer.alloc(0);
  for await (const chunk of createReadStream(path) as AsyncIterable<Buffer>) {
    const bytes = Buffer.concat([carried, chunk]);
    if (bytes.includes(wanted)) return true;
    carried = bytes.subarray(Math.max(0, bytes.length - wanted.length + 1));
  }
  return false;
}

/** Whether a zip file without its directory began as a workbook. */
async function beganAsWorkbook(path: string): Promise<boolean> {
  const file = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(64 * 1024), 0, 64 * 1024, 0);
    const start = buffer.subarray(0, bytesRead);
    return start.includes('[Content_Types].xml') || start.includes('xl/');
  } finally {
    await file.close();
  }
}

export const workbookPart = 'xl/workbook.xml';

/** Whether the file is an .xlsx workbook; a zip file of anything else is not. */
export async function isWorkbook(path: string): Promise<boolean> {
  if (!(await beginsWith(path, zipStart))) return false;
  try {
    return (await readZipDirectory(path)).some((entry) => entry.name === workbookPart);
  } catch (error) {
    if (!(error instanceof ZipDamaged)) throw error;
    if (await beganAsWorkbook(path)) throw damagedWorkbook('breaks off');
    return false;
  }
}

export const requireOpen = (entry: ZipEntry): void => {
  if (entry.encrypted) throw protectedWorkbook();
};

/** Refuses a workbook under a password, which is a compound file that holds the encrypted workbook. */
export async function refuseProtected(path: string): Promise<void> {
  if ((await beginsWith(path, compoundStart)) && (await contains(path, encryptedPackage))) throw protectedWorkbook();
}
