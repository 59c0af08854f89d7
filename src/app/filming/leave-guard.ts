import { inject } from '@angular/core';
import type { CanDeactivateFn } from '@angular/router';
import { Confirm } from '../shared/confirm/confirm';

/** A page from which a clip may be on its way. */
export interface SendsClips {
  isSending(): boolean;
}

/** Asks before a page is left whose upload would be cut off. */
export const leaveGuard: CanDeactivateFn<SendsClips> = (page) =>
  !page.isSending() ||
  inject(Confirm).ask({
    heading: 'A clip is still being sent',
    body: 'If you leave now it stops, and you choose it again when you come back. What has arrived stays.',
    confirmLabel: 'Stop sending and leave',
    cancelLabel: 'Stay',
  });
