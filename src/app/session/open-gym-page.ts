import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { longEnoughPassword, NEW_PASSWORD_HINT } from '../shared/field/new-password';
import { PasswordField } from '../shared/field/password-field';
import { applyProblem } from '../shared/problems/apply-problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { timeZoneNames } from '../shared/times/time-zones';
import { Entrance } from './entrance';
import { SessionApi } from './session-api';
import { SessionStore } from './session-store';

/** Opens a gym: its name and time zone, and the account of its owner. */
@Component({
  selector: 'mf-open-gym-page',
  imports: [
    Entrance,
    Field,
    FieldInput,
    MatButton,
    PasswordField,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './open-gym-page.html',
  styleUrl: './session-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OpenGymPage {
  private readonly api = inject(SessionApi);
  private readonly store = inject(SessionStore);
  private readonly router = inject(Router);

  protected readonly passwordHint = NEW_PASSWORD_HINT;
  protected readonly zones = timeZoneNames();
  protected readonly form = inject(NonNullableFormBuilder).group({
    gymName: ['', [Validators.required, Validators.maxLength(80)]],
    timeZone: [Intl.DateTimeFormat().resolvedOptions().timeZone, Validators.required],
    name: ['', [Validators.required, Validators.maxLength(80)]],
    email: ['', [Validators.required, Validators.email]],
    password: ['', [Validators.required, longEnoughPassword]],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);

  protected async open(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    this.problem.set(null);
    try {
      this.store.accept(await firstValueFrom(this.api.openGym(this.form.getRawValue())));
      await this.router.navigateByUrl(this.store.home());
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
