import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { longEnoughPassword, NEW_PASSWORD_HINT } from '../shared/field/new-password';
import { PasswordField } from '../shared/field/password-field';
import { applyProblem } from '../shared/problems/apply-problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { Entrance } from './entrance';
import { SessionApi } from './session-api';
import { SessionStore } from './session-store';

/** Chooses a new password with the token of a mailed link. */
@Component({
  selector: 'mf-reset-page',
  imports: [Entrance, MatButton, PasswordField, ProblemBox, ReactiveFormsModule, RouterLink],
  template: `
    <mf-entrance heading="Choose a new password" sub="All your devices are signed out when it is set.">
      <mf-problem-box [problem]="problem()">
        <p><a routerLink="/forgot">Ask for a new link</a></p>
      </mf-problem-box>
      <form [formGroup]="form" (ngSubmit)="set()" novalidate>
        <mf-password-field
          label="New password"
          [control]="form.controls.password"
          purpose="new-password"
          [hint]="passwordHint"
        />
        <button matButton="filled" type="submit" [disabled]="isBusy()">Set the password</button>
      </form>
    </mf-entrance>
  `,
  styleUrl: './session-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ResetPage {
  private readonly api = inject(SessionApi);
  private readonly store = inject(SessionStore);
  private readonly router = inject(Router);

  /** The mailed token, from the address. */
  readonly token = input.required<string>();

  protected readonly passwordHint = NEW_PASSWORD_HINT;
  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', [Validators.required, longEnoughPassword]],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);

  protected async set(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    this.problem.set(null);
    try {
      await firstValueFrom(this.api.reset(this.token(), this.form.getRawValue().password));
      this.store.end();
      await this.router.navigate(['/sign-in'], { queryParams: { after: 'password-changed' } });
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
