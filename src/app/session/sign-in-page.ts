import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { PasswordField } from '../shared/field/password-field';
import { applyProblem } from '../shared/problems/apply-problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { DemoAccounts } from './demo-accounts';
import { Entrance } from './entrance';
import { SessionApi } from './session-api';
import { SessionStore } from './session-store';
import { isOwnPath } from './sign-in-tree';

/** Signs in and goes back to the place that asked for it. */
@Component({
  selector: 'mf-sign-in-page',
  imports: [
    DemoAccounts,
    Entrance,
    Field,
    FieldInput,
    MatButton,
    PasswordField,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './sign-in-page.html',
  styleUrl: './session-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly api = inject(SessionApi);
  private readonly store = inject(SessionStore);
  private readonly router = inject(Router);

  /** The place to go to after signing in, from the address. */
  readonly return = input<string>();
  /** Why the person is here, from the address: `password-changed` after a reset. */
  readonly after = input<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    password: ['', Validators.required],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);

  protected async signIn(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    const { email, password } = this.form.getRawValue();
    await this.enter(email, password);
  }

  protected async enter(email: string, password: string): Promise<void> {
    this.isBusy.set(true);
    this.problem.set(null);
    try {
      this.store.accept(await firstValueFrom(this.api.signIn(email, password)));
      const place = this.return();
      await this.router.navigateByUrl(isOwnPath(place) ? place : this.store.home());
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
