import type { Edition, EditionSummary } from '../../api/contract';
import type { ConfirmRequest, NoteRequest } from '../../ui/confirm';

export type EditionAction = 'submit' | 'put-in-force' | 'send-back' | 'withdraw';

/** Who is asking, as far as an edition's next steps go. */
export interface Actor {
  readonly id: string | undefined;
  readonly analyst: boolean;
  readonly reviewer: boolean;
}

/** The steps that an edition's state and the person's roles allow. The service decides again. */
export function actionsFor(edition: Edition, actor: Actor): readonly EditionAction[] {
  switch (edition.state) {
    case 'draft':
      return [...(actor.analyst ? (['submit'] as const) : []), ...(actor.reviewer ? (['withdraw'] as const) : [])];
    case 'under-review':
      return actor.reviewer ? ['put-in-force', 'send-back', 'withdraw'] : [];
    case 'in-force':
    case 'superseded':
      return actor.reviewer ? ['withdraw'] : [];
    case 'withdrawn':
      return [];
  }
}

/** Why the person may not put it in force; undefined when they may. */
export function whyNotPutInForce(edition: Edition, actor: Actor): string | undefined {
  if (edition.mayPutInForce) return undefined;
  if (edition.submittedBy?.id === actor.id) return 'You submitted this edition, so someone else must put it in force.';
  if (edition.createdBy.id === actor.id) return 'You drew up this edition, so someone else must put it in force.';
  return 'A reviewer must put it in force.';
}

export function submitRequest(edition: Edition): ConfirmRequest {
  return {
    heading: `Submit edition ${edition.number} of ${edition.estimatorName} for review?`,
    consequences: [
      'Reviewers are asked to read it and to put it in force or send it back.',
      'You cannot put it in force yourself.',
    ],
    verb: 'Submit for review',
  };
}

export function putInForceRequest(edition: Edition, inForce: EditionSummary | null): ConfirmRequest {
  const replaced = inForce
    ? `Edition ${inForce.number}, in force now, is superseded. Partners that pinned it are still answered from it.`
    : 'It is the first edition of this estimator in force, so partners can ask for estimates from now on.';
  return {
    heading: `Put edition ${edition.number} of ${edition.estimatorName} in force?`,
    consequences: [
      `From now on it answers every partner that asks for ${edition.estimatorName}.`,
      replaced,
      'Your name is kept as the one who approved it.',
    ],
    verb: 'Put in force',
  };
}

export function sendBackRequest(edition: Edition): NoteRequest {
  return {
    heading: `Send edition ${edition.number} of ${edition.estimatorName} back?`,
    consequences: [
      `It becomes a draft again, and ${edition.submittedBy?.name ?? edition.createdBy.name} sees your note.`,
    ],
    verb: 'Send back',
    noteLabel: 'What must change',
  };
}

const readBack = 'Estimates already given can still be read back.';

export function withdrawalConsequences(edition: Edition): readonly string[] {
  const last = 'A withdrawn edition cannot be put in force again.';
  switch (edition.state) {
    case 'draft':
    case 'under-review':
      return ['No partner has seen it, so nothing changes for them.', last];
    case 'in-force':
      return [
        `Partners that ask for ${edition.estimatorName} get no estimate until another edition is in force.`,
        readBack,
        last,
      ];
    default:
      return ['Partners that pinned this edition get no more estimates from it.', readBack, last];
  }
}
