import { mkdtempSync, readFileSync, readdirSync, rmSync, statSync } from 'node:fs';
import { createServer, type Server, type Socket } from 'node:net';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import type { Settings } from '../settings/settings';
import { MailService, openTransport } from './mail-service';

const settings = {
  read: async () => ({ deskName: 'Marl Bay Yard Federation', contactEmail: 'desk@marlbay.example' }),
} as unknown as Settings;
const message = {
  to: { name: 'Ada Ferris', address: 'ada@marlbay.example' },
  subject: 'Set your password',
  text: 'Open the link.\nIt works once.',
};

/** Answers as a mail server does (RFC 5321) and notes what it is told. */
function startMailServer(heard: string[]): Promise<Server> {
  const answer = (socket: Socket, line: string): void => {
    heard.push(line);
    if (/^EHLO/.test(line)) socket.write('250 mail.example\r\n');
    else if (line === 'DATA') socket.write('354 go on\r\n');
    else if (line === '.') socket.write('250 kept\r\n');
    else if (/^QUIT/.test(line)) socket.end('221 bye\r\n');
    else if (/^(MAIL|RCPT)/.test(line)) socket.write('250 fine\r\n');
  };
  const server = createServer((socket) => {
    socket.write('220 mail.example\r\n');
    socket.on('data', (data) =>
      data
        .toString()
        .split('\r\n')
        .filter(Boolean)
        .forEach((line) => answer(socket, line)),
    );
  });
  return new Promise((resolve) => server.listen(0, '127.0.0.1', () => resolve(server)));
}

describe('mail', () => {
  const log = pino({ level: 'silent' });
  let folder: string;
  beforeEach(() => void (folder = mkdtempSync(join(tmpdir(), 'tarebeam-mail-'))));
  afterEach(() => rmSync(folder, { recursive: true, force: true }));

  it('is kept as one file a message, for its owner alone, when no mail server is set', async () => {
    const mail = new MailService(openTransport({ smtpUrl: null, dataFolder: folder }), settings, log);
    expect(await mail.send(message)).toBe(true);
    const [file] = readdirSync(join(folder, 'mail'));
    const text = readFileSync(join(folder, 'mail', file), 'utf8');
    expect(text).toContain('To: Ada Ferris <ada@marlbay.example>');
    expect(text).toContain('From: Marl Bay Yard Federation <desk@marlbay.example>');
    expect(text).toContain('It works once.');
    expect(statSync(join(folder, 'mail', file)).mode & 0o777).toBe(0o600);
  });

  it('goes to the mail server that is set', async () => {
    const heard: string[] = [];
    const server = await startMailServer(heard);
    const { port } = server.address() as AddressInfo;
    const mail = new MailService(
      openTransport({ smtpUrl: `smtp://127.0.0.1:${port}`, dataFolder: folder }),
      settings,
      log,
    );
    expect(await mail.send(message)).toBe(true);
    mail.close();
    server.close();
    expect(heard).toContain('RCPT TO:<ada@marlbay.example>');
    expect(heard).toContain('Subject: Set your password');
  });

  it('says when the mail server cannot be reached, and throws nothing', async () => {
    const mail = new MailService(openTransport({ smtpUrl: 'smtp://127.0.0.1:1', dataFolder: folder }), settings, log);
    expect(await mail.send(message)).toBe(false);
  });
});
