import { DestroyRef, InjectionToken, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import {
  Observable,
  Subject,
  catchError,
  concat,
  concatMap,
  debounce,
  defer,
  map,
  of,
  switchMap,
  tap,
  timer,
} from 'rxjs';
import type { ReadingChoices, ReadingProposal } from '../../api/contract';
import { IncomingFilesClient } from '../../api/incoming-files-client';
import { Problem, problemOf } from '../../api/problem';
import { Announcer } from '../../ui/announcer';
import { countOf } from '../../ui/figure';
import {
  ChoicePlace,
  ColumnChange,
  FileChange,
  columnPlace,
  countChoices,
  fittingChoices,
  layoutOf,
  withColumnChange,
  withFileChange,
  withoutColumn,
} from './reading-choices';
import { complaintsOf } from './reading-complaints';

/** Choices made one after the other within this time are asked about once. */
export const SETTLE_MS = new InjectionToken<number>('milliseconds until a choice is asked about', {
  factory: () => 300,
});

interface Beginning {
  readonly incomingId: string;
  readonly appendTo?: string;
  /** How the file would be read without any choice. */
  readonly found: ReadingProposal;
  /** Chosen before the page was loaded anew. */
  readonly choices?: ReadingChoices;
}

type Answer =
  | {
      readonly proposal: ReadingProposal;
      readonly layout: string;
      /** False when only the names of the columns were asked for. */
      readonly isLast: boolean;
    }
  | { readonly problem: Problem };

/**
 * How a file would be read, and every choice that a person makes about it. Each change asks the service again; what was
 * proposed last stands until the next answer, and after a refusal. Make it in an injection context.
 */
export class ProposedReading {
  private readonly client = inject(IncomingFilesClient);
  private readonly announcer = inject(Announcer);
  private readonly settleMs = inject(SETTLE_MS);
  private readonly chosen = signal<ReadingChoices>({});
  private readonly proposed = signal<ReadingProposal | undefined>(undefined);
  private readonly refusal = signal<Problem | undefined>(undefined);
  private readonly waiting = signal(false);
  private readonly lastChange = signal<ChoicePlace | undefined>(undefined);
  private readonly asks = new Subject<{ readonly afterMs: number }>();
  private incomingId = '';
  private appendTo?: string;
  /** The layout whose columns are known. */
  private layout = layoutOf({});

  readonly choices = this.chosen.asReadonly();
  readonly proposal = this.proposed.asReadonly();
  readonly problem = this.refusal.asReadonly();
  /** True from a change until its answer. */
  readonly asking = this.waiting.asReadonly();
  readonly choiceCount = computed(() => countChoices(this.chosen()));
  readonly columnNames = computed(() => namesOf(this.proposed() ?? { columns: [] }));
  /** The choices that fit the file as it is read now. */
  readonly fitting = computed(() => fittingChoices(this.chosen(), this.columnNames()));
  readonly complaints = computed(() => complaintsOf(this.refusal(), this.fitting(), this.lastChange()));

  constructor() {
    this.asks
      .pipe(
        tap(() => this.waiting.set(true)),
        debounce(({ afterMs }) => timer(afterMs)),
        switchMap(() => this.answers()),
        takeUntilDestroyed(inject(DestroyRef)),
      )
      .subscribe((answer) => this.take(answer));
  }

  begin({ incomingId, appendTo, found, choices = {} }: Beginning): void {
    this.incomingId = incomingId;
    this.appendTo = appendTo;
    this.layout = layoutOf({});
    this.proposed.set(appendTo === undefined ? found : undefined);
    this.chosen.set(choices);
    if (appendTo !== undefined || this.choiceCount() > 0) this.askAgain();
  }

  changeFile(change: FileChange): void {
    this.lastChange.set(Object.keys(change)[0] as ChoicePlace);
    this.choose(withFileChange(this.chosen(), change));
  }

  changeColumn(name: string, change: ColumnChange): void {
    this.lastChange.set(columnPlace(name, Object.keys(change)[0] as keyof ColumnChange));
    this.choose(withColumnChange(this.chosen(), name, change));
  }

  /** The column as it was found. */
  resetColumn(name: string): void {
    this.lastChange.set(undefined);
    this.choose(withoutColumn(this.chosen(), name));
  }

  reset(): void {
    this.lastChange.set(undefined);
    this.choose({});
  }

  askAgain(): void {
    this.asks.next({ afterMs: 0 });
  }

  private choose(choices: ReadingChoices): void {
    this.chosen.set(choices);
    this.asks.next({ afterMs: this.settleMs });
  }

  private answers(): Observable<Answer> {
    return this.ask().pipe(catchError((error: unknown) => of<Answer>({ problem: problemOf(error) })));
  }

  /**
   * A choice for a column that the file does not have would be refused. So when the choices lead to other columns, their
   * names are asked for first, and then what is chosen for those of them that it concerns.
   */
  private ask(): Observable<Answer> {
    return defer(() => {
      const choices = this.chosen();
      const layout = layoutOf(choices);
      const last = (proposal: ReadingProposal): Answer => ({ proposal, layout, isLast: true });
      if (layout === this.layout && this.proposed()) return this.propose(this.fitting()).pipe(map(last));
      return this.propose(fittingChoices(choices, new Set())).pipe(
        concatMap((proposal) => {
          const fitting = fittingChoices(choices, namesOf(proposal));
          if (fitting.columns === undefined) return of(last(proposal));
          const names: Answer = { proposal, layout, isLast: false };
          return concat(of(names), this.propose(fitting).pipe(map(last)));
        }),
      );
    });
  }

  private propose(choices: ReadingChoices): Observable<ReadingProposal> {
    return this.client.propose(this.incomingId, choices, this.appendTo);
  }

  private take(answer: Answer): void {
    if ('problem' in answer) return this.refuse(answer.problem);
    this.layout = answer.layout;
    this.proposed.set(answer.proposal);
    if (!answer.isLast) return;
    this.waiting.set(false);
    this.refusal.set(undefined);
    const { columns, read } = answer.proposal;
    this.announcer.say(
      `The preview was read again: ${countOf(columns.length, 'column')}, ${countOf(read.length, 'row')} shown.`,
    );
  }

  private refuse(problem: Problem): void {
    this.waiting.set(false);
    this.refusal.set(problem);
    this.announcer.say([...this.complaints().values()][0] ?? `${problem.title}. ${problem.detail}`);
  }
}

function namesOf({ columns }: Pick<ReadingProposal, 'columns'>): ReadonlySet<string> {
  return new Set(columns.map(({ name }) => name));
}
