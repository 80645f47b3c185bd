import type { Estimator, EstimatorNew } from '../../api/contract';
import type { Complaints } from '../../ui/entry-form';
import { nameComplaint } from '../../ui/text-rules';
import { slugPattern } from './suggest-slug';

/** An estimator's words while they are typed. */
export interface EstimatorDraft {
  readonly slug: string;
  readonly name: string;
  readonly targetName: string;
  readonly unit: string;
  readonly description: string;
  readonly intendedUse: string;
  readonly notFor: string;
  readonly cautions: readonly string[];
}

export type EstimatorField =
  'slug' | 'name' | 'targetName' | 'unit' | 'description' | 'intendedUse' | 'notFor' | `cautions/${number}`;

export const EMPTY_DRAFT: EstimatorDraft = {
  slug: '',
  name: '',
  targetName: '',
  unit: '',
  description: '',
  intendedUse: '',
  notFor: '',
  cautions: [''],
};

const LONGEST_UNIT = 40;
const LONGEST_TEXT = 4000;
const LONGEST_CAUTION = 500;
const SLUG_WORDS = 'Use small letters, digits and single dashes between them, such as refit-labour.';

export function draftOf(estimator: Estimator): EstimatorDraft {
  const { slug, name, targetName, unit, description, intendedUse, notFor, cautions } = estimator;
  return {
    slug,
    name,
    targetName,
    unit,
    description,
    intendedUse,
    notFor,
    cautions: cautions.length > 0 ? cautions : [''],
  };
}

export function complaintsAbout(draft: EstimatorDraft): Complaints<EstimatorField> {
  const cautions = draft.cautions.map(
    (text, position) => [`cautions/${position}`, tooLong(text, LONGEST_CAUTION)] as const,
  );
  return {
    ...Object.fromEntries(cautions),
    slug: slugComplaint(draft.slug.trim()),
    name: nameComplaint(draft.name, 'a name'),
    targetName: nameComplaint(draft.targetName, 'what is estimated'),
    unit: tooLong(draft.unit, LONGEST_UNIT),
    description: tooLong(draft.description, LONGEST_TEXT),
    intendedUse: tooLong(draft.intendedUse, LONGEST_TEXT),
    notFor: tooLong(draft.notFor, LONGEST_TEXT),
  };
}

/** What is sent: trimmed, and without cautions that were left empty. */
export function wordsOf(draft: EstimatorDraft): EstimatorNew {
  const { slug, name, targetName, unit, description, intendedUse, notFor } = draft;
  return {
    slug: slug.trim(),
    name: name.trim(),
    targetName: targetName.trim(),
    unit: unit.trim(),
    description: description.trim(),
    intendedUse: intendedUse.trim(),
    notFor: notFor.trim(),
    cautions: draft.cautions.map((caution) => caution.trim()).filter(Boolean),
  };
}

function slugComplaint(slug: string): string | undefined {
  if (slug.length < 2) return `Enter a public name. ${SLUG_WORDS}`;
  return slug.length <= 64 && slugPattern.test(slug) ? undefined : SLUG_WORDS;
}

function tooLong(text: string, longest: number): string | undefined {
  const { length } = text.trim();
  return length > longest ? `Shorten it to ${longest} characters; it has ${length}` : undefined;
}
