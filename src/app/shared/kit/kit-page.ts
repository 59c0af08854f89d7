import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Avatar } from '../avatar/avatar';
import { BriefFigure } from '../brief-figure/brief-figure';
import { Chips, type ChipOption } from '../chips/chips';
import { Confirm } from '../confirm/confirm';
import { EmptyState } from '../empty-state/empty-state';
import { Field } from '../field/field';
import { FieldInput } from '../field/field-input';
import { longEnoughPassword, NEW_PASSWORD_HINT } from '../field/new-password';
import { PasswordField } from '../field/password-field';
import { Icon } from '../icons/icon';
import { ICONS, type IconName } from '../icons/icon-set';
import { KeyCap } from '../key-cap/key-cap';
import { StateMark } from '../marks/state-mark';
import { PageHeading } from '../page-heading/page-heading';
import { Logo } from '../plumb/logo';
import { Plumb } from '../plumb/plumb';
import { Poster } from '../poster/poster';
import { Preferences } from '../preferences/preferences';
import { ProblemBox } from '../problems/problem-box';
import type { Problem } from '../problems/problem';
import { SideSheet } from '../side-sheet/side-sheet';
import { Skeleton } from '../skeleton/skeleton';
import { Snackbar } from '../snackbar/snackbar';
import { TimeLeft } from '../time-left/time-left';
import { AbsoluteTime } from '../times/absolute-time';
import { RelativeTime } from '../times/relative-time';
import { UploadProgress } from '../upload-progress/upload-progress';

const HOUR_MS = 3_600_000;

function fromNow(hours: number): string {
  return new Date(Date.now() + hours * HOUR_MS).toISOString();
}

/** Every shared part in its states, on one page: to look at, and to check in both themes. */
@Component({
  selector: 'mf-kit-page',
  imports: [
    AbsoluteTime,
    Avatar,
    BriefFigure,
    Chips,
    EmptyState,
    Field,
    FieldInput,
    Icon,
    KeyCap,
    Logo,
    MatButton,
    PageHeading,
    PasswordField,
    Plumb,
    Poster,
    ProblemBox,
    ReactiveFormsModule,
    RelativeTime,
    SideSheet,
    Skeleton,
    StateMark,
    TimeLeft,
    UploadProgress,
  ],
  templateUrl: './kit-page.html',
  styleUrl: './kit-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KitPage {
  protected readonly snackbar = inject(Snackbar);
  protected readonly confirm = inject(Confirm);
  protected readonly preferences = inject(Preferences);

  protected readonly iconNames = Object.keys(ICONS) as IconName[];
  protected readonly passwordHint = NEW_PASSWORD_HINT;
  protected readonly since = fromNow(-3);
  protected readonly dueTimes = [fromNow(-0.4), fromNow(0.67), fromNow(1.2), fromNow(3.1), fromNow(26)];
  protected readonly filter = signal('all');
  protected readonly filters: readonly ChipOption[] = [
    { value: 'all', label: 'All lifts', count: 5 },
    { value: 'today', label: 'Needed today', count: 3 },
    { value: 'second', label: 'Second takes' },
    { value: 'free', label: 'Nobody has it' },
  ];
  protected readonly isSheetOpen = signal(false);
  protected readonly problem: Problem = {
    type: 'about:blank',
    title: 'This take is with Petru',
    status: 409,
    detail: 'He picked it up 4 minutes ago. Open the next one, or wait until he puts it back.',
  };
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', Validators.required],
    pattern: ['hinge'],
    note: [''],
    password: ['', [Validators.required, longEnoughPassword]],
  });
}
