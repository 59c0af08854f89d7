import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import type { Role, UserDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Confirm } from '../shared/confirm/confirm';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import type { Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { requestKey } from '../shared/request-key/request-key';
import { SideSheet } from '../shared/side-sheet/side-sheet';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { PeopleStore } from './people-store';
import {
  calendarWords,
  deactivateQuestion,
  invitableRoles,
  reactivateQuestion,
  ROLE_WORDS,
  roleQuestion,
  withArticle,
} from './people-words';

/** One person: who they are, a guardian's consent, and what the owner may change. */
@Component({
  selector: 'mf-person-sheet',
  imports: [
    AbsoluteTime,
    Field,
    FieldInput,
    MatButton,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
    SideSheet,
    Skeleton,
  ],
  templateUrl: './person-sheet.html',
  styleUrl: './person-sheet.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonSheet implements HasUnsavedChanges {
  private readonly confirm = inject(Confirm);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);
  /** Stays the same for every try to record the same consent. */
  private key = requestKey();

  protected readonly store = inject(PeopleStore);

  /** From the address. */
  readonly personId = input.required<string>();

  protected readonly roles = invitableRoles('owner');
  protected readonly roleWords = ROLE_WORDS;
  protected readonly calendarWords = calendarWords;
  protected readonly role = new FormControl<Role>('member', { nonNullable: true });
  protected readonly guardian = new FormControl('', {
    nonNullable: true,
    validators: [Validators.required, Validators.maxLength(120)],
  });
  protected readonly roleForm = new FormGroup({ role: this.role });
  protected readonly consentForm = new FormGroup({ guardian: this.guardian });
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isBusy = signal(false);
  protected readonly person = computed(() => this.store.people()?.find(({ id }) => id === this.personId()));
  protected readonly isSelf = computed(() => this.session.user()?.id === this.personId());
  protected readonly isOwner = computed(() => this.session.role() === 'owner');

  constructor() {
    const role = computed(() => this.person()?.role);
    effect(() => {
      const now = role();
      if (now) this.role.reset(now);
    });
    this.guardian.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => (this.key = requestKey()));
  }

  hasUnsavedChanges(): boolean {
    return this.guardian.value.trim() !== '' || this.role.dirty;
  }

  protected async changeRole(person: UserDto): Promise<void> {
    const role = this.role.value;
    if (role === person.role) {
      this.role.markAsPristine();
      this.snackbar.say(`${person.name} is ${withArticle(role)} already.`);
      return;
    }
    if (!(await this.confirm.ask(roleQuestion(person, role, this.isSelf())))) return;
    if (!(await this.act(() => this.store.change(person.id, { role })))) return;
    this.role.markAsPristine();
    this.snackbar.say(`${person.name} is now ${withArticle(role)}.`);
    await this.seeWhoIAm();
  }

  protected async setActive(person: UserDto, active: boolean): Promise<void> {
    const question = active ? reactivateQuestion(person) : deactivateQuestion(person);
    if (!(await this.confirm.ask(question))) return;
    if (!(await this.act(() => this.store.change(person.id, { active })))) return;
    this.snackbar.say(active ? `${person.name} can sign in again.` : `${person.name} is deactivated.`);
    await this.seeWhoIAm();
  }

  protected async recordConsent(person: UserDto): Promise<void> {
    this.guardian.markAsTouched();
    const guardianName = this.guardian.value.trim();
    if (guardianName === '') this.guardian.setValue('');
    if (this.guardian.invalid) return;
    if (!(await this.act(() => this.store.recordConsent(person.id, guardianName, this.key)))) return;
    this.guardian.reset();
    this.snackbar.say(`Recorded. Coaches can see ${person.name}’s clips now.`);
  }

  protected close(): void {
    void this.router.navigate(['/people'], { queryParamsHandling: 'preserve' });
  }

  /** @returns whether it was done; if not, `problem` says why */
  private async act(run: () => Promise<Problem | null>): Promise<boolean> {
    if (this.isBusy()) return false;
    this.isBusy.set(true);
    this.problem.set(null);
    const problem = await run();
    this.problem.set(problem);
    this.isBusy.set(false);
    return problem === null;
  }

  /** Who changed their own account may be in another role now, or signed out. */
  private async seeWhoIAm(): Promise<void> {
    if (!this.isSelf()) return;
    this.guardian.reset();
    await this.session.check();
    if (this.session.status() === 'signed-in' && !this.isOwner()) {
      await this.router.navigateByUrl(this.session.home());
    }
  }
}
