import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../shared/page-heading/page-heading';

@Component({
  selector: 'mf-queue-page',
  imports: [PageHeading],
  template: `<div class="mf-page"><mf-page-heading heading="Queue" /></div>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QueuePage {}
