import { DestroyRef, ElementRef, Injector, afterNextRender, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Observable, finalize } from 'rxjs';
import { Problem, errorOf, problemOf } from '../api/problem';

/** What is wrong with each field, in words; undefined where nothing is. */
export type Complaints<FieldName extends string> = Readonly<Partial<Record<FieldName, string | undefined>>>;

/**
 * What stands around a form's fields: complaints found here or by the service, one write at a time, and the focus moved to
 * the first field complained about. What was typed belongs to the screen and is never touched. Make it in an injection
 * context, in the component whose template holds the form. Field names are those of what is sent.
 */
export class EntryForm<FieldName extends string> {
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly destroyRef = inject(DestroyRef);
  private readonly injector = inject(Injector);
  private readonly found = signal<Complaints<FieldName> | undefined>(undefined);
  private readonly refusal = signal<Problem | undefined>(undefined);
  private readonly sending = signal(false);

  /** Why the service refused, until the next try. */
  readonly problem = this.refusal.asReadonly();
  readonly underWay = this.sending.asReadonly();

  /** The complaint about a field, ours first. */
  errorOf(field: FieldName): string | undefined {
    return this.found()?.[field] ?? errorOf(this.refusal(), field);
  }

  /** Shows the complaints; true when there are none. */
  accept(complaints: Complaints<FieldName>): boolean {
    this.refusal.set(undefined);
    this.found.set(complaints);
    const accepted = Object.values(complaints).every((complaint) => complaint === undefined);
    if (!accepted) this.focusComplaint();
    return accepted;
  }

  /** Sends unless something is on its way already. */
  send<Answer>(request: Observable<Answer>, done: (answer: Answer) => void): void {
    if (this.sending()) return;
    this.sending.set(true);
    this.refusal.set(undefined);
    request
      .pipe(
        takeUntilDestroyed(this.destroyRef),
        finalize(() => this.sending.set(false)),
      )
      .subscribe({ next: done, error: (error: unknown) => this.refuse(problemOf(error)) });
  }

  private refuse(problem: Problem): void {
    this.refusal.set(problem);
    this.focusComplaint();
  }

  private focusComplaint(): void {
    afterNextRender({ read: () => this.firstComplaint()?.focus() }, { injector: this.injector });
  }

  private firstComplaint(): HTMLElement | null {
    return this.element.nativeElement.querySelector<HTMLElement>('[aria-invalid="true"], .tb-complained input');
  }
}
