import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import type { UserDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Confirm } from '../shared/confirm/confirm';
import { PasswordField } from '../shared/field/password-field';
import { applyProblem } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { Snackbar } from '../shared/snackbar/snackbar';
import { AccountApi } from './account-api';
import { eraseQuestion, eraseWords } from './erase-words';

/** Erases me, after my password and a question. */
@Component({
  selector: 'mf-erase-form',
  imports: [MatButton, PasswordField, ProblemBox, ReactiveFormsModule],
  template: `
    <form class="mf-stack" [formGroup]="form" (ngSubmit)="erase()" novalidate>
      <p>{{ words() }}</p>
      <mf-password-field label="Your password" [control]="form.controls.password" />
      <mf-problem-box [problem]="problem()" />
      <div>
        <button matButton="outlined" type="submit" [disabled]="isErasing()">
          {{ isErasing() ? 'Erasing …' : 'Erase me' }}
        </button>
      </div>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EraseForm {
  private readonly api = inject(AccountApi);
  private readonly confirm = inject(Confirm);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  readonly user = input.required<UserDto>();

  protected readonly form = inject(NonNullableFormBuilder).group({ password: ['', Validators.required] });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isErasing = signal(false);
  protected readonly words = computed(() => eraseWords(this.user().role));

  protected async erase(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isErasing()) return;
    if (!(await this.confirm.ask(eraseQuestion(this.user().role)))) return;
    this.isErasing.set(true);
    this.problem.set(null);
    try {
      await firstValueFrom(this.api.erase(this.form.getRawValue().password));
      this.session.end();
      this.snackbar.say('You are erased. Thank you for having trained here.');
      await this.router.navigateByUrl('/sign-in');
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isErasing.set(false);
    }
  }
}
