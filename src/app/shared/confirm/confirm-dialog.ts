import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogTitle,
} from '@angular/material/dialog';
import type { Question } from './question';

@Component({
  selector: 'mf-confirm-dialog',
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>{{ question.heading }}</h2>
    <mat-dialog-content>{{ question.body }}</mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="outlined" type="button" [mat-dialog-close]="false">
        {{ question.cancelLabel }}
      </button>
      <button matButton="filled" type="button" [mat-dialog-close]="true">{{ question.confirmLabel }}</button>
    </mat-dialog-actions>
  `,
  styles: `
    mat-dialog-actions {
      gap: var(--mf-space-2);
      padding: var(--mf-space-2) var(--mf-space-5) var(--mf-space-5);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmDialog {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
}
