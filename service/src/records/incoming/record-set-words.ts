import { DeskError } from '../../errors';

export const nameTaken = (name: string, pointer = '#/name'): DeskError =>
  new DeskError(
    'name-taken',
    `A record set is called ${name} already. Choose another name, or bring the file in as its next revision.`,
    { errors: [{ pointer, detail: 'is the name of another record set' }] },
  );

export interface SetWords {
  readonly name: string;
  readonly description: string;
}

/** The words of a new set from the text fields of a form. */
export function readWords(fields: ReadonlyMap<string, string>): SetWords {
  const name = (fields.get('name') ?? '').trim();
  const description = (fields.get('description') ?? '').trim();
  const wrong = (pointer: string, detail: string): DeskError =>
    new DeskError('request-invalid', `Mend the form and send it again: ${pointer.slice(2)} ${detail}.`, {
      errors: [{ pointer, detail }],
    });
  if (name === '') throw wrong('#/name', 'is missing');
  if (name.length > 120) throw wrong('#/name', 'is longer than 120 characters');
  if (description.length > 2000) throw wrong('#/description', 'is longer than 2000 characters');
  return { name, description };
}
