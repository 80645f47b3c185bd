import { Injectable } from '@angular/core';
import type { ReadingChoices } from '../../api/contract';

/** What a person has entered about a file that waits to be brought in. */
export interface BringInDraft {
  readonly choices: ReadingChoices;
  readonly words: RecordSetWords;
}

export interface RecordSetWords {
  /** Undefined until something was typed: the file's name stands in. */
  readonly name?: string;
  readonly description: string;
  /** Year-month-day; empty keeps the rows. */
  readonly retainUntil: string;
}

export const NO_WORDS: RecordSetWords = { description: '', retainUntil: '' };

/** Keeps what was entered over a reload of the page: the service keeps the file, and not what one thinks of it. */
@Injectable({ providedIn: 'root' })
export class KeptBringIn {
  read(incomingId: string): BringInDraft | undefined {
    const text = whenAllowed(() => sessionStorage.getItem(keyOf(incomingId)));
    return text ? (JSON.parse(text) as BringInDraft) : undefined;
  }

  write(incomingId: string, draft: BringInDraft): void {
    whenAllowed(() => sessionStorage.setItem(keyOf(incomingId), JSON.stringify(draft)));
  }

  forget(incomingId: string): void {
    whenAllowed(() => sessionStorage.removeItem(keyOf(incomingId)));
  }
}

function keyOf(incomingId: string): string {
  return `tarebeam.bring-in.${incomingId}`;
}

/** A browser may forbid storage or have none left; then a reload starts from what was found in the file. */
function whenAllowed<Value>(use: () => Value): Value | undefined {
  try {
    return use();
  } catch (error) {
    if (error instanceof DOMException) return undefined;
    throw error;
  }
}
