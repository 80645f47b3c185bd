import type { Config } from '../config';
import type { DemonstrationNote } from './note';

/** Sign-ins and one call, ready to paste. */
export function announcement({ publicUrl }: Pick<Config, 'publicUrl'>, note: DemonstrationNote): string {
  const width = Math.max(...note.people.map((person) => person.email.length));
  const people = note.people.map(
    (person) => `    ${person.email.padEnd(width)}  ${person.roles.join(', ')} (${person.name})`,
  );
  const body = JSON.stringify({ inputs: note.exampleInputs });
  return [
    `  Demonstration. Everybody signs in with the password: ${note.password}`,
    ...people,
    '',
    '  An estimate, as a partner’s server asks for it:',
    `    curl -s ${publicUrl}/v1/estimators/${note.estimator}/estimates -H 'X-Api-Key: ${note.partnerKey}' -H 'Content-Type: application/json' -d '${body}'`,
    '',
  ].join('\n');
}
