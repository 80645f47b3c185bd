import { inject, Injectable, signal } from '@angular/core';
import { CLIENT_FOR } from '../api/client-for';
import type { PublishedEstimator } from '../api/contract';
import { Connection } from '../api/estimates-client';
import { EstimatesError } from '../api/estimates-error';
import { AnsweredCase } from './answered-case';
import { failureWords, FormFailure, notSetUp } from './failure-words';
import { fieldsFrom } from './fields-from-schema';
import { FormField } from './form-field';
import { FieldErrors, readCase, TypedTexts } from './read-case';
import { Wait } from './wait';

export type Description =
  | { readonly state: 'loading' }
  | { readonly state: 'failed'; readonly failure: FormFailure; readonly mayRetry: boolean }
  | ReadyDescription;

export interface ReadyDescription {
  readonly state: 'ready';
  readonly estimator: PublishedEstimator;
  readonly fields: readonly FormField[];
}

export type Answer =
  | { readonly state: 'none' | 'asking' }
  | { readonly state: 'failed'; readonly failure: FormFailure }
  | { readonly state: 'answered'; readonly answered: AnsweredCase; readonly typed: TypedTexts };

export interface Wanted extends Connection {
  readonly estimator: string;
}

export type Outcome =
  | { readonly kind: 'answered'; readonly answered: AnsweredCase }
  | { readonly kind: 'failed'; readonly error: EstimatesError }
  | { readonly kind: 'entries-wrong' | 'not-asked' };

/** What one form knows: the estimator, what is typed, what is wrong with it, and the latest answer. */
@Injectable()
export class FormSession {
  readonly description = signal<Description>({ state: 'loading' });
  readonly answer = signal<Answer>({ state: 'none' });
  readonly typed = signal<TypedTexts>({});
  readonly errors = signal<FieldErrors>({});
  /** Problems that the desk found with the case as a whole. */
  readonly caseErrors = signal<readonly string[]>([]);
  readonly wait = new Wait();

  private readonly clientFor = inject(CLIENT_FOR);
  /** Counts what was asked for, so that a late answer to an earlier estimator is dropped. */
  private generation = 0;

  type(name: string, text: string): void {
    if ((this.typed()[name] ?? '') !== text) {
      this.typed.update((typed) => ({ ...typed, [name]: text }));
    }
  }

  /** What is typed stays; it still stands in fields of the same name. */
  async load(wanted: Wanted): Promise<EstimatesError | null> {
    const generation = ++this.generation;
    this.clearAnswer();
    const missing = (['estimator', 'key', 'service'] as const).filter((name) => wanted[name] === '');
    if (missing.length > 0) {
      this.description.set({ state: 'failed', failure: notSetUp(missing), mayRetry: false });
      return null;
    }
    this.description.set({ state: 'loading' });
    try {
      const estimator = await this.clientFor(wanted).describe(wanted.estimator);
      if (generation === this.generation) {
        this.description.set({ state: 'ready', estimator, fields: fieldsFrom(estimator.inputs) });
      }
      return null;
    } catch (error) {
      const known = knownError(error);
      if (generation === this.generation) {
        const failure = this.failureFor(known);
        this.description.set({ state: 'failed', failure, mayRetry: true });
      }
      return known;
    }
  }

  async submit(connection: Connection, locale?: string): Promise<Outcome> {
    const description = this.description();
    if (description.state !== 'ready' || this.answer().state === 'asking' || this.wait.seconds() > 0) {
      return { kind: 'not-asked' };
    }
    const reading = readCase(description.fields, this.typed(), locale);
    this.caseErrors.set([]);
    this.errors.set(reading.ok ? {} : reading.errors);
    if (!reading.ok) {
      return { kind: 'entries-wrong' };
    }
    const { estimator, fields } = description;
    return this.ask(connection, { estimator, fields, inputs: reading.inputs });
  }

  private async ask(connection: Connection, asked: Omit<AnsweredCase, 'estimate'>): Promise<Outcome> {
    const [generation, typed] = [this.generation, this.typed()];
    this.answer.set({ state: 'asking' });
    try {
      const estimate = await this.clientFor(connection).ask(asked.estimator.slug, asked.inputs);
      const answered = { ...asked, estimate };
      if (generation === this.generation) {
        this.answer.set({ state: 'answered', answered, typed });
      }
      return { kind: 'answered', answered };
    } catch (caught) {
      const error = knownError(caught);
      if (generation === this.generation) {
        this.sortProblems(error, asked.fields);
        this.answer.set({ state: 'failed', failure: this.failureFor(error) });
      }
      return { kind: 'failed', error };
    }
  }

  /** The desk's problems go beside the fields that they point to. */
  private sortProblems({ details }: EstimatesError, fields: readonly FormField[]): void {
    const errors: Record<string, string> = {};
    const others: string[] = [];
    for (const { input, detail } of details.fields ?? []) {
      const field = fields.find(({ name }) => name === input);
      if (!field) {
        others.push(detail);
      } else {
        errors[field.name] ??= `${field.label}: ${detail}`;
      }
    }
    this.errors.set(errors);
    this.caseErrors.set(others);
  }

  private failureFor(error: EstimatesError): FormFailure {
    const failure = failureWords(error, location.origin);
    this.wait.start(failure.waitSeconds ?? 0);
    return failure;
  }

  private clearAnswer(): void {
    this.answer.set({ state: 'none' });
    this.errors.set({});
    this.caseErrors.set([]);
    this.wait.start(0);
  }
}

/** A fault of the form's own is written to the console in full; the page only learns that there was one. */
function knownError(error: unknown): EstimatesError {
  if (error instanceof EstimatesError) {
    return error;
  }
  console.error(error);
  return new EstimatesError('internal', 'The form failed in a way that it does not know.', {}, error);
}
