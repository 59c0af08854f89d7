import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  signal,
  type OnInit,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import type { InvitationDto } from '@contract';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { longEnoughPassword, NEW_PASSWORD_HINT } from '../shared/field/new-password';
import { PasswordField } from '../shared/field/password-field';
import { Plumb } from '../shared/plumb/plumb';
import { applyProblem } from '../shared/problems/apply-problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { Entrance } from './entrance';
import { SessionApi } from './session-api';
import { SessionStore } from './session-store';

/** Accepts an invitation: a password, and for members a date of birth, because under 18 a guardian must consent. */
@Component({
  selector: 'mf-invitation-page',
  imports: [
    Entrance,
    Field,
    FieldInput,
    MatButton,
    PasswordField,
    Plumb,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './invitation-page.html',
  styleUrl: './session-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvitationPage implements OnInit {
  private readonly api = inject(SessionApi);
  private readonly store = inject(SessionStore);
  private readonly router = inject(Router);

  /** The mailed token, from the address. */
  readonly token = input.required<string>();

  protected readonly passwordHint = NEW_PASSWORD_HINT;
  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', [Validators.required, longEnoughPassword]],
    bornOn: ['', Validators.required],
  });
  protected readonly invitation = signal<InvitationDto | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);
  protected readonly isMember = computed(() => this.invitation()?.role === 'member');
  protected readonly heading = computed(() => {
    const invitation = this.invitation();
    return invitation ? `Welcome to ${invitation.gymName}, ${invitation.name}` : 'Your invitation';
  });
  protected readonly sub = computed(() => {
    const invitation = this.invitation();
    return invitation ? `${invitation.invitedBy} invited you as ${invitation.role}.` : undefined;
  });

  ngOnInit(): void {
    void this.readInvitation();
  }

  protected async accept(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    const { password, bornOn } = this.form.getRawValue();
    this.isBusy.set(true);
    this.problem.set(null);
    try {
      const born = this.isMember() ? bornOn : undefined;
      this.store.accept(await firstValueFrom(this.api.accept(this.token(), password, born)));
      await this.router.navigateByUrl(this.store.home());
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isBusy.set(false);
    }
  }

  private async readInvitation(): Promise<void> {
    try {
      const invitation = await firstValueFrom(this.api.invitation(this.token()));
      if (invitation.role !== 'member') this.form.controls.bornOn.disable();
      this.invitation.set(invitation);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }
}
