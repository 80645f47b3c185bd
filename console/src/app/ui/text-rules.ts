/** Complaints about typed text, in words; undefined where there is nothing to complain about. */

const LONGEST_EMAIL = 254;

export function nameComplaint(text: string, noun: string, longest = 120): string | undefined {
  const length = text.trim().length;
  if (length === 0) return `Enter ${noun}`;
  return length > longest ? `Shorten it to ${longest} characters; it has ${length}` : undefined;
}

/** Only what no address can lack: the service and the mail itself decide the rest. */
export function emailComplaint(text: string): string | undefined {
  const address = text.trim();
  if (address === '') return 'Enter an e-mail address';
  if (address.length > LONGEST_EMAIL) return `An e-mail address has at most ${LONGEST_EMAIL} characters`;
  return /^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(address)
    ? undefined
    : 'Enter an e-mail address such as name@partner.example';
}
