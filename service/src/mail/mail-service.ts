import { createTransport, type Transporter } from 'nodemailer';
import { join } from 'node:path';
import type { Logger } from 'pino';
import type { Config } from '../config';
import type { Settings } from '../settings/settings';
import { KeepingTransport } from './keeping-transport';
import type { Message } from './message';

/** A mail server that does not answer must not hold up the person who waits for the page. */
const patienceMs = 10_000;

export function openTransport(config: Pick<Config, 'smtpUrl' | 'dataFolder'>): Transporter {
  if (config.smtpUrl === null) return createTransport(new KeepingTransport(join(config.dataFolder, 'mail')));
  return createTransport({
    url: config.smtpUrl,
    connectionTimeout: patienceMs,
    greetingTimeout: patienceMs,
    socketTimeout: patienceMs,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
}

export class MailService {
  constructor(
    private readonly transporter: Transporter,
    private readonly settings: Settings,
    private readonly log: Logger,
  ) {}

  /** Hands a message over; false, with the reason in the log, when that fails. */
  async send(message: Message): Promise<boolean> {
    const { deskName, contactEmail } = await this.settings.read();
    try {
      await this.transporter.sendMail({ from: { name: deskName, address: contactEmail }, ...message });
      return true;
    } catch (error) {
      // The server's own words only: the message holds the link.
      this.log.error(
        { reason: error instanceof Error ? error.message : 'unknown', subject: message.subject },
        'a message could not be sent',
      );
      return false;
    }
  }

  close(): void {
    this.transporter.close();
  }
}
