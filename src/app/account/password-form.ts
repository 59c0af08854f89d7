import { ChangeDetectionStrategy, Component, inject, output, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import { SessionStore } from '../session/session-store';
import { longEnoughPassword, NEW_PASSWORD_HINT } from '../shared/field/new-password';
import { PasswordField } from '../shared/field/password-field';
import { applyProblem } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { Snackbar } from '../shared/snackbar/snackbar';
import { AccountApi } from './account-api';

/** Chooses another password; the present one is asked for, so that an open screen is not enough. */
@Component({
  selector: 'mf-password-form',
  imports: [MatButton, PasswordField, ProblemBox, ReactiveFormsModule],
  template: `
    <form class="mf-stack" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mf-password-field
        label="Present password"
        [control]="form.controls.currentPassword"
        purpose="current-password"
      />
      <mf-password-field
        label="New password"
        [control]="form.controls.password"
        purpose="new-password"
        [hint]="hint"
      />
      <mf-problem-box [problem]="problem()" />
      <div>
        <button matButton="outlined" type="submit" [disabled]="isSaving()">
          {{ isSaving() ? 'Changing …' : 'Change password' }}
        </button>
      </div>
      <p class="mf-small mf-quiet">It signs you out everywhere else.</p>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PasswordForm {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  /** The password is another now, and every other session has ended. */
  readonly changed = output();

  protected readonly hint = NEW_PASSWORD_HINT;
  readonly form = inject(NonNullableFormBuilder).group({
    currentPassword: ['', Validators.required],
    password: ['', [Validators.required, longEnoughPassword]],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isSaving = signal(false);

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isSaving()) return;
    this.isSaving.set(true);
    this.problem.set(null);
    try {
      this.session.accept(await firstValueFrom(this.api.change(this.form.getRawValue())));
      this.form.reset();
      this.snackbar.say('Your password is changed. You are signed out everywhere else.');
      this.changed.emit();
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isSaving.set(false);
    }
  }
}
