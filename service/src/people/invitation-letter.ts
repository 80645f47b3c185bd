import type { Message } from '../mail/message';

export interface InvitationLetter {
  readonly name: string;
  readonly email: string;
  readonly invitedBy: string;
  readonly deskName: string;
  readonly url: string;
  readonly expiresAt: string;
}

const day = (time: string): string =>
  new Date(time).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });

export function invitationLetter(letter: InvitationLetter): Message {
  return {
    to: { name: letter.name, address: letter.email },
    subject: `${letter.deskName}: set your password`,
    text: [
      `Good day ${letter.name},`,
      `${letter.invitedBy} has entered you at ${letter.deskName}. Open this address and set a password:`,
      letter.url,
      `It works once, until ${day(letter.expiresAt)} (UTC). After that, ask ${letter.invitedBy} for a new one.`,
      'If you did not expect this message, leave the address unopened and nothing happens.',
      letter.deskName,
    ].join('\n\n'),
  };
}
