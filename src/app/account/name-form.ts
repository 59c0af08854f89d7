import { ChangeDetectionStrategy, Component, inject, input, signal, type OnInit } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import type { UserDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { applyProblem } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { Snackbar } from '../shared/snackbar/snackbar';
import { AccountApi } from './account-api';

/** My name, and what I train with. */
@Component({
  selector: 'mf-name-form',
  imports: [Field, FieldInput, MatButton, ProblemBox, ReactiveFormsModule],
  template: `
    <form class="mf-stack" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mf-field label="Name">
        <input mfInput formControlName="name" autocomplete="name" />
      </mf-field>
      @if (user().role === 'member') {
        <mf-field
          label="What you train with"
          [optional]="true"
          hint="In your own words; coaches see it and choose lifts to fit."
        >
          <textarea
            mfInput
            formControlName="kit"
            rows="2"
            placeholder="One 16 kg kettlebell and two chairs"
          ></textarea>
        </mf-field>
      }
      <mf-problem-box [problem]="problem()" />
      <div>
        <button matButton="filled" type="submit" [disabled]="isSaving()">
          {{ isSaving() ? 'Saving …' : 'Save' }}
        </button>
      </div>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NameForm implements OnInit {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  readonly user = input.required<UserDto>();

  readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(80)]],
    kit: ['', Validators.maxLength(300)],
  });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isSaving = signal(false);

  ngOnInit(): void {
    this.form.setValue({ name: this.user().name, kit: this.user().kit ?? '' });
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isSaving()) return;
    this.isSaving.set(true);
    this.problem.set(null);
    const { name, kit } = this.form.getRawValue();
    const isMember = this.user().role === 'member';
    try {
      this.session.accept(
        await firstValueFrom(this.api.change({ name: name.trim(), ...(isMember ? { kit } : {}) })),
      );
      this.form.markAsPristine();
      this.snackbar.say('Saved.');
    } catch (error) {
      this.problem.set(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isSaving.set(false);
    }
  }
}
