import fs, { mkdtempSync, readdirSync, readFileSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable, Writable } from 'node:stream';
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

  const nameOf = (letter: string) => letter.repeat(16);
  const write = (names: readonly string[], ageMs: number) => {
    const time = new Date(Date.now() - ageMs);
    for (const name of names) {
      writeFileSync(join(folder, name), '');
      utimesSync(join(folder, name), time, time);
    }
  };
  const hourMs = 60 * 60 * 1000;

  it('lose what a killed process left a day ago and nothing names, and nothing else', async () => {
    const [waiting, revision] = [`incoming-${nameOf('w')}`, nameOf('r')];
    const left = [`incoming-${nameOf('a')}`, `incoming-${nameOf('a')}.spill`, nameOf('b')];
    write([waiting, revision, 'a note of the keeper', ...left], 25 * hourMs);
    write([`incoming-${nameOf('y')}`, nameOf('z')], 23 * hourMs);
    await files.sweep(new Date(), (name) => [waiting, revision].includes(name));
    const kept = [waiting, revision, 'a note of the keeper', `incoming-${nameOf('y')}`, nameOf('z')];
    expect(readdirSync(folder).sort()).toEqual(kept.sort());
  });

  it('count as young when they get their lasting name, and can be taken back from it', async () => {
    const file = await files.receive(Readable.from([Buffer.from('a')]));
    const dayAgo = new Date(Date.now() - 25 * hourMs);
    utimesSync(file.path, dayAgo, dayAgo);
    await files.keep(file, nameOf('k'));
    await files.sweep(new Date(), () => false);
    expect(readdirSync(folder)).toEqual([nameOf('k')]);
    await files.takeBack(file, nameOf('k'));
    await files.takeBack(file, nameOf('k'));
    expect(readdirSync(folder)).toEqual([files.nameOf(file)]);
    expect(files.received(files.nameOf(file), file)).toEqual(file);
  });

  it('say so when the disk is full, and leave nothing', async () => {
    const full = new Writable({
      write: (_chunk, _encoding, done) => done(Object.assign(new Error('no space left on device'), { code: 'ENOSPC' })),
    });
    const disk = jest.spyOn(fs, 'createWriteStream').mockImplementation((path) => {
      writeFileSync(path, 'a part');
      return full as fs.WriteStream;
    });
    await expect(files.receive(Readable.from([Buffer.from('a')]))).rejects.toMatchObject({
      code: 'storage-full',
      status: 507,
    });
    disk.mockRestore();
    expect(readdirSync(folder)).toEqual([]);
  });

  it('bear plain names', () => {
    expect(plainFileName('../../etc/boats.csv')).toBe('boats.csv');
    expect(plainFileName('C:\\exports\\bo\r\nats.csv')).toBe('boats.csv');
    expect(plainFileName(undefined)).toBe('records.csv');
  });
});
