import { mkdtempSync, readdirSync, readFileSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { KeptFiles } from './kept-files';
import { plainFileName } from './receive-upload';

describe('kept files', () => {
  let folder: string;
  let files: KeptFiles;
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'tarebeam-kept-'));
    files = new KeptFiles(folder, 10);
  });
  afterEach(() => rmSync(folder, { recursive: true }));

  it('are kept byte for byte, with their hash and length', async () => {
    const file = await files.receive(Readable.from([Buffer.from('a,b\n'), Buffer.from('1,2\n')]));
    await files.keep(file, 'revision');
    expect(readFileSync(files.pathOf('revision'), 'utf8')).toBe('a,b\n1,2\n');
    expect(file).toMatchObject({ byteCount: 8, sha256: createHash('sha256').update('a,b\n1,2\n').digest('hex') });
    expect(readdirSync(folder)).toEqual(['revision']);
  });

  it('leave nothing when they are too large or the source breaks', async () => {
    await expect(files.receive(Readable.from([Buffer.alloc(11)]))).rejects.toMatchObject({ code: 'file-too-large' });
    const broken = new Readable({ read: (): void => void broken.destroy(new Error('gone')) });
    await expect(files.receive(broken)).rejects.toThrow('gone');
    expect(readdirSync(folder)).toEqual([]);
  });

  it('lose what a killed process left a day ago, and nothing else', async () => {
    const now = new Date();
    const dayAgo = new Date(now.getTime() - 25 * 60 * 60 * 1000);
    for (const name of ['incoming-old', 'incoming-old.spill', 'incoming-new', 'revision'])
      writeFileSync(join(folder, name), '');
    for (const name of ['incoming-old', 'incoming-old.spill', 'revision'])
      utimesSync(join(folder, name), dayAgo, dayAgo);
    await files.sweep(now);
    expect(readdirSync(folder).sort()).toEqual(['incoming-new', 'revision']);
  });

  it('bear plain names', () => {
    expect(plainFileName('../../etc/boats.csv')).toBe('boats.csv');
    expect(plainFileName('C:\\exports\\bo\r\nats.csv')).toBe('boats.csv');
    expect(plainFileName(undefined)).toBe('records.csv');
  });
});
