import { Component, inject } from '@angular/core';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { ConfirmRequest } from './confirm';

@Component({
  selector: 'tb-confirm-dialog',
  imports: [MatDialogModule],
  templateUrl: './confirm-dialog.html',
  styleUrl: './confirm-dialog.scss',
})
export class ConfirmDialog {
  private readonly opened = inject<MatDialogRef<ConfirmDialog, boolean>>(MatDialogRef);
  protected readonly request = inject<ConfirmRequest>(MAT_DIALOG_DATA);

  protected answer(yes: boolean): void {
    this.opened.close(yes);
  }
}
