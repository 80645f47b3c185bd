import { DOCUMENT } from '@angular/common';
import { Component, ElementRef, inject, input, signal, viewChild } from '@angular/core';
import { Announcer } from './announcer';

/** Text to take elsewhere (a key, a link, a snippet), with a button that copies it. */
@Component({
  selector: 'tb-copy-text',
  templateUrl: './copy-text.html',
  styleUrl: './copy-text.scss',
})
export class CopyText {
  /** What the text is, such as `The key`. */
  readonly label = input.required<string>();
  readonly text = input.required<string>();
  private readonly announcer = inject(Announcer);
  private readonly document = inject(DOCUMENT);
  private readonly shown = viewChild.required<ElementRef<HTMLElement>>('shown');
  protected readonly outcome = signal<string | undefined>(undefined);

  protected async copy(): Promise<void> {
    const copied = await this.writeToClipboard();
    if (!copied) this.select();
    const outcome = copied ? 'Copied' : 'Selected: copy it with Ctrl+C or ⌘C';
    this.outcome.set(outcome);
    this.announcer.say(`${this.label()}: ${outcome}`);
  }

  /** Browsers refuse the clipboard outside a secure context, and where the person has turned it off. */
  private async writeToClipboard(): Promise<boolean> {
    const clipboard: Clipboard | undefined = this.document.defaultView?.navigator.clipboard;
    if (clipboard === undefined) return false;
    return clipboard.writeText(this.text()).then(
      () => true,
      () => false,
    );
  }

  private select(): void {
    this.document.getSelection()?.selectAllChildren(this.shown().nativeElement);
  }
}
