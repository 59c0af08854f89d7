import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { applyProblem } from '../shared/problems/apply-problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { Entrance } from './entrance';
import { SessionApi } from './session-api';

/** Asks for a link to choose a new password. The answer never tells whether the account exists. */
@Component({
  selector: 'mf-forgot-page',
  imports: [Entrance, Field, FieldInput, MatButton, ProblemBox, ReactiveFormsModule, RouterLink],
  template: `
    <mf-entrance
      heading="Choose a new password"
      [sub]="isSent() ? undefined : 'We send a link to your e-mail address.'"
    >
      @if (isSent()) {
        <p role="status">
          If there is an account for <strong>{{ form.getRawValue().email }}</strong>, a link is on its way. It
          works once, for an hour. Look among the unwanted mail too.
        </p>
      } @else {
        <mf-problem-box [problem]="problem()" />
        <form [formGroup]="form" (ngSubmit)="send()" novalidate>
          <mf-field label="E-mail">
            <input
              mfInput
              type="email"
              formControlName="email"
              autocomplete="username"
              autocapitalize="none"
              spellcheck="false"
            />
          </mf-field>
          <button matButton="filled" type="submit" [disabled]="isBusy()">Send the link</button>
        </form>
      }
      <p class="links"><a routerLink="/sign-in">Back to sign in</a></p>
    </mf-entrance>
  `,
  styleUrl: './session-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForgotPage {
  private readonly api = inject(SessionApi);

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);
  protected readonly isSent = signal(false);

  protected async send(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    try {
      await firstValueFrom(this.api.forgot(this.form.getRawValue().email));
      this.isSent.set(true);
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
