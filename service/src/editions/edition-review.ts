import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import type { Database } from '../database/database';
import { DeskError, notFound } from '../errors';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import { EditionAct, requireAct } from './edition-states';
import { isOwn } from './editions-service';
import type { EditionMove, EditionRecord, EditionsStore, EditionState } from './editions-store';

export interface EditionReviewParts {
  readonly database: Database;
  readonly editions: EditionsStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

interface Step {
  readonly person: SignedInPerson;
  readonly edition: EditionRecord;
  readonly move: EditionMove;
  readonly note: string;
  /** For the journal: `edition-…` and "… edition 4 of refit-labour". */
  readonly action: string;
  readonly verb: string;
}

/** Moves an edition from state to state. Every step is one unit of work with its event and its line in the journal. */
export class EditionReview {
  constructor(private readonly parts: EditionReviewParts) {}

  async submit(person: SignedInPerson, id: string): Promise<void> {
    await this.parts.database.unitOfWork(async () => {
      const edition = await this.requireFor(id, EditionAct.submit);
      const move = { state: 'under-review', submittedAt: this.now(), submittedBy: person.id } as const;
      await this.take({ person, edition, move, note: '', action: 'edition-submitted', verb: 'submitted' });
    });
  }

  /** The edition in force until now is superseded in the same unit of work: there is never none and never two. */
  async putInForce(person: SignedInPerson, id: string): Promise<void> {
    const { database, editions } = this.parts;
    await database.unitOfWork(async () => {
      const edition = await this.requireFor(id, EditionAct.putInForce);
      if (isOwn(person, edition))
        throw new DeskError(
          'own-edition',
          'You drew it up or submitted it. Ask another reviewer to read it and put it in force.',
        );
      for (const previous of await editions.inForceOf([edition.estimatorId])) {
        const move = { state: 'superseded', endedAt: this.now() } as const;
        await this.take({
          person,
          edition: previous,
          move,
          note: `Superseded by edition ${edition.number}.`,
          action: 'edition-superseded',
          verb: 'superseded',
        });
      }
      const move = { state: 'in-force', inForceAt: this.now(), inForceBy: person.id } as const;
      await this.take({ person, edition, move, note: '', action: 'edition-put-in-force', verb: 'put in force' });
    });
  }

  async sendBack(person: SignedInPerson, id: string, note: string): Promise<void> {
    await this.parts.database.unitOfWork(async () => {
      const edition = await this.requireFor(id, EditionAct.sendBack);
      const move = { state: 'draft', submittedAt: null, submittedBy: null } as const;
      await this.take({ person, edition, move, note, action: 'edition-sent-back', verb: 'sent back' });
    });
  }

  /** Calls that name the edition are answered until `sunsetAt`; without it they end at once. */
  async withdraw(
    person: SignedInPerson,
    id: string,
    withdrawal: { readonly note: string; readonly sunsetAt?: string | null },
  ): Promise<void> {
    await this.parts.database.unitOfWork(async () => {
      const edition = await this.requireFor(id, EditionAct.withdraw);
      const move = {
        state: 'withdrawn',
        endedAt: edition.endedAt ?? this.now(),
        sunsetAt: this.futureTime(withdrawal.sunsetAt ?? null),
      } as const;
      await this.take({ person, edition, move, note: withdrawal.note, action: 'edition-withdrawn', verb: 'withdrew' });
    });
  }

  private now(): string {
    return timeText(this.parts.clock);
  }

  private async requireFor(id: string, act: EditionAct): Promise<EditionRecord> {
    const edition = await this.parts.editions.find(id);
    if (!edition) throw notFound('edition');
    requireAct(edition, act);
    return edition;
  }

  private async take({ person, edition, move, note, action, verb }: Step): Promise<void> {
    const { editions, journal } = this.parts;
    const moved = await translateUnique(
      () => editions.move(edition.id, edition.state, move),
      'editions.estimator_id',
      overtaken,
    );
    if (!moved) throw overtaken();
    await editions.insertEvent({
      editionId: edition.id,
      at: this.now(),
      by: person.id,
      state: move.state satisfies EditionState,
      note,
    });
    await journal.write({
      actorId: person.id,
      action,
      subjectKind: 'edition',
      subjectId: edition.id,
      summary: `${person.name} ${verb} edition ${edition.number} of ${edition.slug}`,
    });
  }

  private futureTime(given: string | null): string | null {
    if (given === null) return null;
    const time = new Date(given);
    if (time.getTime() > this.parts.clock.now().getTime()) return time.toISOString();
    const detail = 'Give a time in the future, or null to end at once.';
    throw new DeskError('request-invalid', detail, { errors: [{ pointer: '#/sunsetAt', detail }] });
  }
}

const overtaken = (): DeskError =>
  new DeskError('edition-state', 'Somebody else changed this estimator’s editions a moment ago. Read them again.');
