import { Injectable } from '@angular/core';
import { emptyDraft, type FitDraft } from './fit-draft';

/** Keeps what was chosen for each estimator while the console is open, so that leaving the page loses nothing. */
@Injectable({ providedIn: 'root' })
export class FitDrafts {
  private readonly drafts = new Map<string, FitDraft>();

  of(slug: string): FitDraft {
    return this.drafts.get(slug) ?? emptyDraft;
  }

  keep(slug: string, draft: FitDraft): void {
    this.drafts.set(slug, draft);
  }

  /** The fit was started: the next one begins afresh. */
  forget(slug: string): void {
    this.drafts.delete(slug);
  }
}
