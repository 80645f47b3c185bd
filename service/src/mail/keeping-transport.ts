import { createWriteStream } from 'node:fs';
import { mkdir, rename } from 'node:fs/promises';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { SentMessageInfo, Transport } from 'nodemailer';
import type MailMessage from 'nodemailer/lib/mailer/mail-message';
import { newId } from '../database/new-id';

type Sent = (error: Error | null, info: SentMessageInfo) => void;

/**
 * Stands in for a mail server where none is set: keeps every message as a file, as it would have gone out.
 * Named by time, so that a listing shows the newest last.
 */
export class KeepingTransport implements Transport {
  readonly name = 'keeping';
  readonly version = '1';

  constructor(private readonly folder: string) {}

  send(mail: MailMessage, sent: Sent): void {
    this.keep(mail).then(
      (path) => sent(null, { messageId: mail.message.messageId(), envelope: mail.message.getEnvelope(), path }),
      (error: unknown) => sent(error instanceof Error ? error : new Error(String(error)), null),
    );
  }

  private async keep(mail: MailMessage): Promise<string> {
    await mkdir(this.folder, { recursive: true, mode: 0o700 });
    const path = join(this.folder, `${new Date().toISOString().replaceAll(':', '-')}-${newId()}.eml`);
    // Messages carry invitation links, so they are for the account that runs the service alone.
    await pipeline(mail.message.createReadStream(), createWriteStream(`${path}.part`, { mode: 0o600 }));
    await rename(`${path}.part`, path);
    return path;
  }
}
