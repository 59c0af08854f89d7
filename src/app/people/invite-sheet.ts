import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  inject,
  Injector,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import type { Role } from '@contract';
import { SessionStore } from '../session/session-store';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { applyProblem, SERVER_ERROR } from '../shared/problems/apply-problem';
import type { Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { requestKey } from '../shared/request-key/request-key';
import { SideSheet } from '../shared/side-sheet/side-sheet';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Snackbar } from '../shared/snackbar/snackbar';
import { PeopleStore } from './people-store';
import { invitableRoles, ROLE_WORDS, withArticle } from './people-words';

/** Invites somebody by mail: a sheet over the list of people. */
@Component({
  selector: 'mf-invite-sheet',
  imports: [Field, FieldInput, MatButton, ProblemBox, ReactiveFormsModule, SideSheet],
  template: `
    <mf-side-sheet heading="Invite" [isDirty]="form.dirty" (closed)="close()">
      <form id="invite" [formGroup]="form" class="mf-stack" (ngSubmit)="send()" novalidate>
        <p>They get a mail with a link that works for seven days, and choose a password themselves.</p>
        <mf-field label="Name" hint="As coaches and members shall see it.">
          <input mfInput formControlName="name" autocomplete="off" />
        </mf-field>
        <mf-field label="E-mail address">
          <input
            mfInput
            type="email"
            formControlName="email"
            autocomplete="off"
            autocapitalize="none"
            spellcheck="false"
          />
        </mf-field>
        @if (roles.length > 1) {
          <mf-field label="Role" [hint]="roleWords[role()]">
            <select mfInput formControlName="role">
              @for (role of roles; track role) {
                <option [value]="role">{{ role }}</option>
              }
            </select>
          </mf-field>
        } @else {
          <p class="mf-quiet">They come in as a member. The owner invites coaches.</p>
        }
        @if (role() === 'member') {
          <p class="mf-small mf-quiet">
            Members give their date of birth. Under 18, a guardian’s consent must be recorded here before a
            coach can see their clips.
          </p>
        }
        <mf-problem-box [problem]="problem()" />
      </form>
      <button sheetActs matButton="text" type="button" (click)="close()">Cancel</button>
      <button sheetActs matButton="filled" type="submit" form="invite" [disabled]="isSending()">
        {{ isSending() ? 'Inviting …' : 'Invite ' + article(role()) }}
      </button>
    </mf-side-sheet>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InviteSheet implements HasUnsavedChanges {
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly injector = inject(Injector);
  private readonly router = inject(Router);
  private readonly snackbar = inject(Snackbar);
  private readonly store = inject(PeopleStore);
  /** Stays the same for every try to send the same words. */
  private key = requestKey();

  protected readonly roles = invitableRoles(inject(SessionStore).role());
  protected readonly roleWords = ROLE_WORDS;
  protected readonly article = withArticle;
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(80)]],
    email: ['', [Validators.required, Validators.email, Validators.maxLength(254)]],
    role: 'member' as Role,
  });
  protected readonly role = toSignal(this.form.controls.role.valueChanges, { initialValue: 'member' });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isSending = signal(false);

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => (this.key = requestKey()));
  }

  hasUnsavedChanges(): boolean {
    return this.form.dirty;
  }

  protected async send(): Promise<void> {
    if (this.isSending()) return;
    this.form.markAllAsTouched();
    if (this.form.invalid) {
      this.refuse(null);
      return;
    }
    this.problem.set(null);
    this.isSending.set(true);
    const { name, email, role } = this.form.getRawValue();
    const problem = await this.store.invite({ name: name.trim(), email: email.trim(), role }, this.key);
    this.isSending.set(false);
    if (problem) {
      this.refuse(this.placed(problem));
      return;
    }
    this.form.markAsPristine();
    this.snackbar.say(`An invitation is on its way to ${email.trim()}.`);
    this.close();
  }

  protected close(): void {
    void this.router.navigate(['/people'], { queryParamsHandling: 'preserve' });
  }

  /** The problem without what a field says itself. */
  private placed(problem: Problem): Problem | null {
    if (!problem.type.endsWith(':email-taken')) return applyProblem(this.form, problem);
    this.form.controls.email.setErrors({ [SERVER_ERROR]: problem.detail });
    return null;
  }

  /** Shows what is wrong, and puts the focus on the first field that is. */
  private refuse(problem: Problem | null): void {
    this.problem.set(problem);
    afterNextRender(
      { read: () => this.element.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus() },
      { injector: this.injector },
    );
  }
}
