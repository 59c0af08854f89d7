import { Injectable, signal } from '@angular/core';

/** The IANA time zone in which every time is shown: the gym's, set by the session; UTC before anybody signed in. */
@Injectable({ providedIn: 'root' })
export class GymZone {
  readonly zone = signal('UTC');
}
