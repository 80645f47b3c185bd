import type { components } from '../../../openapi/types/desk';
import type { EditionRecord, PersonName } from './editions-store';

type EditionSummary = components['schemas']['EditionSummary'];

const copied = (person: PersonName | null): { id: string; name: string } | null => (person ? { ...person } : null);

export function toEditionSummary(edition: EditionRecord): EditionSummary {
  const { id, number, slug, estimatorName, unit, state, changeNote, fitId, method, rmse, recordCount, inputCount } =
    edition;
  const { createdAt, submittedAt, inForceAt, endedAt } = edition;
  return {
    ...{
      id,
      number,
      estimator: slug,
      estimatorName,
      unit,
      state,
      changeNote,
      fitId,
      method,
      rmse,
      recordCount,
      inputCount,
    },
    ...{ createdAt, submittedAt, inForceAt, endedAt },
    createdBy: { ...edition.createdBy },
    submittedBy: copied(edition.submittedBy),
    inForceBy: copied(edition.inForceBy),
  };
}
