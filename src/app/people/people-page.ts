import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink, RouterOutlet } from '@angular/router';
import type { InvitationDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Avatar } from '../shared/avatar/avatar';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { Confirm } from '../shared/confirm/confirm';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { RelativeTime } from '../shared/times/relative-time';
import { PeopleStore } from './people-store';
import { dueWords, inOrder, invitableRoles, isShown, matches, peopleWords, SHOWN } from './people-words';

const LABELS = {
  all: 'All',
  members: 'Members',
  coaches: 'Coaches',
  owners: 'Owners',
  inactive: 'Deactivated',
} as const;

/** Everyone of the gym and who has been invited. A person, and an invitation, open in a sheet over the list. */
@Component({
  selector: 'mf-people-page',
  imports: [
    Avatar,
    Chips,
    EmptyState,
    MatButton,
    PageHeading,
    ProblemBox,
    RelativeTime,
    RouterLink,
    RouterOutlet,
    Skeleton,
  ],
  providers: [PeopleStore],
  templateUrl: './people-page.html',
  styleUrl: './people-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeoplePage {
  private readonly confirm = inject(Confirm);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  protected readonly store = inject(PeopleStore);

  /** Who is shown and what is searched for, from the address. */
  readonly show = input<string>();
  readonly q = input<string>();

  /** The invitation that is being withdrawn or sent again. */
  protected readonly busyId = signal<string | null>(null);
  protected readonly shown = computed(() => SHOWN.find((shown) => shown === this.show()) ?? 'all');
  protected readonly search = computed(() => this.q()?.trim() ?? '');
  protected readonly heading = computed(() => {
    const people = this.store.people();
    return people ? peopleWords(people) : 'People';
  });
  protected readonly sub = computed(() => {
    const people = this.store.people();
    return people ? dueWords(people, this.store.invitations()) : undefined;
  });
  protected readonly options = computed<readonly ChipOption[]>(() => {
    const people = this.store.people() ?? [];
    return SHOWN.map((shown) => ({
      value: shown,
      label: LABELS[shown],
      count: people.filter((person) => isShown(person, shown)).length,
    })).filter(({ value, count }) => value === 'all' || value === this.shown() || count > 0);
  });
  protected readonly rows = computed(() =>
    inOrder(this.store.people() ?? []).filter(
      (person) => isShown(person, this.shown()) && matches(person, this.search()),
    ),
  );
  protected readonly invitations = computed(() => {
    const roles = invitableRoles(this.session.role());
    return this.store.invitations().map((invitation) => ({
      invitation,
      mayInviteAgain: roles.includes(invitation.role),
    }));
  });
  protected readonly ownId = computed(() => this.session.user()?.id);

  protected choose(shown: string): void {
    this.keep({ show: shown === 'all' ? null : shown });
  }

  protected look(search: string): void {
    this.keep({ q: search.trim() === '' ? null : search });
  }

  protected showEveryone(): void {
    this.keep({ show: null, q: null });
  }

  protected async inviteAgain({ id, email, name, role }: InvitationDto): Promise<void> {
    this.busyId.set(id);
    const problem = await this.store.invite({ email, name, role });
    this.busyId.set(null);
    this.snackbar.say(
      problem
        ? problem.detail
        : `A new mail is on its way to ${email}. The link in the earlier one no longer works.`,
    );
  }

  protected async withdraw({ id, email, name }: InvitationDto): Promise<void> {
    const sure = await this.confirm.ask({
      heading: `Withdraw the invitation to ${name}?`,
      body: `The link mailed to ${email} stops working. You can invite them again at any time.`,
      confirmLabel: 'Withdraw',
      cancelLabel: 'Keep it open',
    });
    if (!sure) return;
    this.busyId.set(id);
    const problem = await this.store.withdraw(id);
    this.busyId.set(null);
    this.snackbar.say(problem ? problem.detail : `The invitation to ${name} is withdrawn.`);
  }

  private keep(queryParams: Record<string, string | null>): void {
    void this.router.navigate(['/people'], {
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}
