import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { SnackbarOutlet } from './shared/snackbar/snackbar-outlet';
import { Preferences } from './shared/preferences/preferences';
import { ConnectionBanner } from './shell/connection-banner';
import { HeadingFocus } from './shell/heading-focus';

/** The root: whatever page the address names, and what stands over every page. */
@Component({
  selector: 'mf-root',
  imports: [ConnectionBanner, RouterOutlet, SnackbarOutlet],
  template: `
    <mf-connection-banner />
    <router-outlet />
    <mf-snackbar-outlet />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {
  constructor() {
    // Both act by themselves from here on: the theme's class on html, and focus after each navigation.
    inject(Preferences);
    inject(HeadingFocus);
  }
}
