import { ChangeDetectionStrategy, Component, computed, inject, signal, viewChildren } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { SessionStore } from '../session/session-store';
import { Download } from '../shared/download/download';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { RelativeTime } from '../shared/times/relative-time';
import { EXPORT_URL, type SignedInPlace } from './account-api';
import { EraseForm } from './erase-form';
import { NameForm } from './name-form';
import { PasswordForm } from './password-form';
import { PlacesStore } from './places-store';

/** What belongs to the person signed in: name, password, where they are signed in, their data. */
@Component({
  selector: 'mf-account-page',
  imports: [EraseForm, MatButton, NameForm, PageHeading, PasswordForm, ProblemBox, RelativeTime, Skeleton],
  providers: [PlacesStore],
  host: { '(window:beforeunload)': 'warnBeforeUnload($event)' },
  templateUrl: './account-page.html',
  styleUrl: './account-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPage implements HasUnsavedChanges {
  private readonly download = inject(Download);
  private readonly snackbar = inject(Snackbar);
  private readonly names = viewChildren(NameForm);
  private readonly passwords = viewChildren(PasswordForm);

  protected readonly session = inject(SessionStore);
  protected readonly places = inject(PlacesStore);
  protected readonly isMember = computed(() => this.session.role() === 'member');
  protected readonly isMakingZip = signal(false);

  hasUnsavedChanges(): boolean {
    return [...this.names(), ...this.passwords()].some((part) => part.form.dirty);
  }

  protected warnBeforeUnload(event: Event): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected async saveZip(): Promise<void> {
    this.isMakingZip.set(true);
    await this.download.save(EXPORT_URL);
    this.isMakingZip.set(false);
  }

  protected async endPlace(place: SignedInPlace): Promise<void> {
    if (await this.places.end(place.id)) this.snackbar.say(`Signed out there: ${place.device}.`);
  }
}
